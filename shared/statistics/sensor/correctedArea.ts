import { normalCdf } from '../distributions/normalCdf.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** What is known of the error: the reliability within classes, or variances. */
export type KnownError =
  | { reliability: number }
  | { observedVariancePresent: number; observedVarianceAbsent: number; errorVariance: number }

/**
 * An observed area freed from measurement error, for normal values: divided by √λ on the probit scale,
 * λ = σ²/(σ² + σe²) within a class (a pooled cohort's reliability is too high), or with the classes'
 * own observed variances. Secondary to the observed area; its interval needs a bootstrap that takes in
 * the reliability study.
 * @param observedArea strictly between 0 and 1
 * @param error `errorVariance` is that of the mean of the replicates used, day to day included
 * @throws StatisticsError 'out-of-range'
 * Source: Faraggi 2000, Stat Med 19:61; Reiser 2000, Stat Med 19:2115; Schisterman et al 2001.
 */
export function correctedArea(observedArea: number, error: KnownError): number {
  requireProbability(observedArea, 'The observed area')
  const probit = normalQuantile(observedArea)
  if ('reliability' in error) {
    if (!(error.reliability > 0 && error.reliability <= 1)) {
      throw new StatisticsError('out-of-range', 'A reliability lies above 0 and at most at 1.')
    }
    return normalCdf(probit / Math.sqrt(error.reliability))
  }
  const total = error.observedVariancePresent + error.observedVarianceAbsent
  const rest = total - 2 * error.errorVariance
  if (!(rest > 0) || !(error.errorVariance >= 0)) {
    throw new StatisticsError(
      'out-of-range',
      'The error variance must be smaller than the observed variances.',
    )
  }
  return normalCdf(probit * Math.sqrt(total / rest))
}
