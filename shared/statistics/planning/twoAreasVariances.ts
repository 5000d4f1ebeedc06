import { StatisticsError } from '../StatisticsError.ts'
import type { PilotComparison } from './PilotComparison.ts'

/**
 * Variances of the difference of two areas times the number present: under the null (both curves as the
 * first) and under the alternative.
 * @throws StatisticsError 'out-of-range' where the areas are equal or a variance is not above 0
 * Source: Obuchowski & McClish 1997, Stat Med 16:1529.
 */
export function twoAreasVariances(pilot: PilotComparison): { null: number; alternative: number } {
  const { variance1, variance2, covariance, nPresent } = pilot
  const underNull = 2 * (variance1 - covariance)
  const alternative = variance1 + variance2 - 2 * covariance
  if (!(underNull > 0 && alternative > 0) || pilot.area1 === pilot.area2) {
    throw new StatisticsError(
      'out-of-range',
      'The pilot’s areas must differ and their difference must have a variance.',
    )
  }
  return { null: underNull * nPresent, alternative: alternative * nPresent }
}
