import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { requireCount } from '../requireCount.ts'
import { StatisticsError } from '../StatisticsError.ts'

/**
 * Wilson's score interval of a proportion, without continuity correction; exactly 0 and 1 at the ends.
 * @param numerator 0…denominator  @param denominator at least 1
 * @throws StatisticsError 'out-of-range'
 * Source: Wilson 1927, J Am Stat Assoc 22:209.
 */
export function wilsonInterval(
  numerator: number,
  denominator: number,
  { level = 0.95 }: LevelOption = {},
): Interval {
  requireCount(numerator, 'The numerator')
  requireCount(denominator, 'The denominator', 1)
  if (numerator > denominator) {
    throw new StatisticsError('out-of-range', 'The numerator exceeds the denominator.')
  }
  const z = zFor(level)
  const p = numerator / denominator
  const square = z * z
  const centre = p + square / (2 * denominator)
  const spread =
    z * Math.sqrt((p * (1 - p)) / denominator + square / (4 * denominator * denominator))
  const scale = 1 + square / denominator
  return {
    lower: numerator === 0 ? 0 : Math.max(0, (centre - spread) / scale),
    upper: numerator === denominator ? 1 : Math.min(1, (centre + spread) / scale),
  }
}
