import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { wilsonInterval } from './wilsonInterval.ts'

/**
 * Wilson's score interval of a proportion with continuity correction; exactly 0 and 1 at the ends.
 * @throws StatisticsError 'out-of-range'
 * Source: Newcombe 1998, Stat Med 17:857, method 4.
 */
export function wilsonContinuityInterval(
  numerator: number,
  denominator: number,
  options: LevelOption = {},
): Interval {
  wilsonInterval(numerator, denominator, options) // refuses what is no proportion
  const z = zFor(options.level ?? 0.95)
  const n = denominator
  const p = numerator / n
  const q = 1 - p
  const scale = 2 * (n + z * z)
  const centre = 2 * n * p + z * z
  const below = z * Math.sqrt(Math.max(0, z * z - 2 - 1 / n + 4 * p * (n * q + 1)))
  const above = z * Math.sqrt(Math.max(0, z * z + 2 - 1 / n + 4 * p * (n * q - 1)))
  return {
    lower: numerator === 0 ? 0 : Math.max(0, (centre - 1 - below) / scale),
    upper: numerator === n ? 1 : Math.min(1, (centre + 1 + above) / scale),
  }
}
