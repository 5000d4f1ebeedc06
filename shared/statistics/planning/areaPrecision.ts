import { hanleyMcNeilError } from '../accuracy/hanleyMcNeilError.ts'
import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { smallestWhole } from './smallestWhole.ts'

/**
 * The smallest number present for which the interval of an area has at most the half-width wanted.
 * @param plan area 0.5…1, half-width above 0
 * @throws StatisticsError 'out-of-range'
 * Source: Hanley & McNeil 1982, Radiology 143:29.
 */
export function areaPrecision(
  plan: { area: number; halfWidth: number; absentPerPresent?: number },
  { level = 0.95 }: LevelOption = {},
): { present: number; absent: number; halfWidth: number } {
  const { area, halfWidth, absentPerPresent = 1 } = plan
  if (!(area >= 0.5 && area < 1) || !(halfWidth > 0) || !(absentPerPresent > 0)) {
    throw new StatisticsError(
      'out-of-range',
      'The area lies in 0.5…1; half-width and ratio lie above 0.',
    )
  }
  const z = zFor(level)
  const absentFor = (present: number) => Math.ceil(absentPerPresent * present - 1e-9)
  const half = (nPresent: number) =>
    z * hanleyMcNeilError({ area, nPresent, nAbsent: absentFor(nPresent) })
  const present = smallestWhole((n) => half(n) <= halfWidth, 1)
  return { present, absent: absentFor(present), halfWidth: half(present) }
}
