import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'

/**
 * Standard error of an area from its size and the class sizes alone, for planning:
 * Q1 = A/(2 − A), Q2 = 2A²/(1 + A).
 * @param area 0…1  @param nPresent, nAbsent at least 1
 * @throws StatisticsError 'out-of-range'
 * Source: Hanley & McNeil 1982, Radiology 143:29.
 */
export function hanleyMcNeilError({
  area,
  nPresent,
  nAbsent,
}: {
  area: number
  nPresent: number
  nAbsent: number
}): number {
  if (!(area >= 0 && area <= 1)) {
    throw new StatisticsError('out-of-range', 'An area lies between 0 and 1.')
  }
  requireCount(nPresent, 'The number with the condition', 1)
  requireCount(nAbsent, 'The number without the condition', 1)
  const square = area * area
  const q1 = area / (2 - area)
  const q2 = (2 * square) / (1 + area)
  const sum = area * (1 - area) + (nPresent - 1) * (q1 - square) + (nAbsent - 1) * (q2 - square)
  return Math.sqrt(Math.max(0, sum) / (nPresent * nAbsent))
}
