import { normalQuantile } from '../distributions/normalQuantile.ts'
import { requireProbability } from '../requireProbability.ts'
import type { SampleSize } from './areaSampleSizeAgainstHalf.ts'
import type { PilotComparison } from './PilotComparison.ts'
import { twoAreasVariances } from './twoAreasVariances.ts'

/**
 * Subjects needed to show that two areas on the same subjects differ, two-sided, at the pilot's own
 * ratio of absent to present unless another is given.
 * @throws StatisticsError 'out-of-range'
 * Source: Obuchowski & McClish 1997, Stat Med 16:1529, variances after DeLong.
 */
export function twoAreasSampleSize(
  pilot: PilotComparison,
  { power, alpha = 0.05 }: { power: number; alpha?: number },
): SampleSize {
  requireProbability(power, 'The power')
  requireProbability(alpha, 'The significance level')
  const variances = twoAreasVariances(pilot)
  const root =
    -normalQuantile(alpha / 2) * Math.sqrt(variances.null) +
    normalQuantile(power) * Math.sqrt(variances.alternative)
  const presentExact = (root / (pilot.area1 - pilot.area2)) ** 2
  const absentExact = (presentExact * pilot.nAbsent) / pilot.nPresent
  return {
    presentExact,
    absentExact,
    present: Math.ceil(presentExact),
    absent: Math.ceil(absentExact),
  }
}
