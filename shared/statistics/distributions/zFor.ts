import { requireProbability } from '../requireProbability.ts'
import { normalQuantile } from './normalQuantile.ts'

/**
 * The normal multiplier of a two-sided interval: 1.959963984540054 at level 0.95.
 * @throws StatisticsError 'out-of-range'
 */
export function zFor(level: number): number {
  requireProbability(level, 'The confidence level')
  return -normalQuantile((1 - level) / 2)
}
