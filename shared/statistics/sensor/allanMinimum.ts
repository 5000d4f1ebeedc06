import { StatisticsError } from '../StatisticsError.ts'
import type { AllanPoint } from './allanDeviation.ts'

/**
 * The averaging length with the smallest Allan deviation; of ties the shortest.
 * @param points at least one, from allanDeviation
 * @throws StatisticsError 'too-few'
 * Source: Werle, Mücke & Slemr 1993, Appl Phys B 57:131.
 */
export function allanMinimum(points: readonly AllanPoint[]): AllanPoint {
  const first = points[0]
  if (first === undefined) throw new StatisticsError('too-few', 'There is no Allan deviation.')
  return points.reduce((best, point) => (point.deviation < best.deviation ? point : best), first)
}
