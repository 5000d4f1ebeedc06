import { normalCdf } from '../distributions/normalCdf.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import type { PilotComparison } from './PilotComparison.ts'
import { twoAreasVariances } from './twoAreasVariances.ts'

/**
 * Power to show that two areas on the same subjects differ, two-sided, with a number present (the
 * pilot's own unless given) and the pilot's ratio of absent to present.
 * @throws StatisticsError 'out-of-range'
 * Source: Obuchowski & McClish 1997, Stat Med 16:1529, variances after DeLong.
 */
export function twoAreasPower(
  pilot: PilotComparison,
  { alpha = 0.05, nPresent = pilot.nPresent }: { alpha?: number; nPresent?: number } = {},
): number {
  requireProbability(alpha, 'The significance level')
  requireCount(nPresent, 'The number present', 2)
  const variances = twoAreasVariances(pilot)
  const gap = Math.abs(pilot.area1 - pilot.area2) * Math.sqrt(nPresent)
  const reach = gap + normalQuantile(alpha / 2) * Math.sqrt(variances.null)
  return normalCdf(reach / Math.sqrt(variances.alternative))
}
