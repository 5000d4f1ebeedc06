import { repeatability } from '#shared/statistics/agreement/repeatability.ts'
import { replicateLimitsConstant } from '#shared/statistics/agreement/replicateLimitsConstant.ts'
import { replicateLimitsVarying } from '#shared/statistics/agreement/replicateLimitsVarying.ts'
import { replicatePairsOf, replicatesByMethodOf, replicatesOf } from './agreementInput.ts'
import type { Quantities } from './Quantity.ts'

export const replicateQuantities: Quantities = {
  repeatability: (s) => {
    const answer = repeatability(replicatesOf(s))
    const { analysis, withinSubjectSd } = answer
    return {
      subjects: analysis.subjects,
      observations: analysis.observations,
      grand_mean: analysis.grandMean,
      msb: analysis.meanSquareBetween,
      msw: analysis.meanSquareWithin,
      df_between: analysis.dfBetween,
      df_within: analysis.dfWithin,
      m0: analysis.effectiveReplicates,
      within_subject_sd: withinSubjectSd,
      within_subject_sd_ci95: answer.withinSubjectSdInterval,
      repeatability_coefficient: answer.repeatabilityCoefficient,
      'repeatability_2.77': 2.77 * withinSubjectSd,
      cv_percent: answer.cvPercent,
      rms_cv_percent: answer.rootMeanSquareCvPercent,
      cv_log_percent_exp: answer.cvLogPercentExp,
      cv_log_percent_lognormal: answer.cvLogPercentLognormal,
      between_subject_variance: answer.betweenSubjectVariance,
      icc_1_1: answer.reliability,
    }
  },
  limits_replicates_true_value_varies: (s) => {
    const answer = replicateLimitsVarying(replicatePairsOf(s))
    const { bias, sd } = answer
    return {
      subjects: answer.subjects,
      pairs: answer.pairs,
      bias,
      msb: answer.meanSquareBetween,
      msw: answer.meanSquareWithin,
      m0: answer.effectiveReplicates,
      between_variance: answer.betweenVariance,
      within_variance: answer.withinVariance,
      sd,
      lower: answer.lower,
      upper: answer.upper,
      'lower_1.96': bias - 1.96 * sd,
      'upper_1.96': bias + 1.96 * sd,
    }
  },
  limits_replicates_true_value_varies_zou: (s) => {
    const { mover } = replicateLimitsVarying(replicatePairsOf(s))
    return {
      bias: mover.bias,
      sd: mover.sd,
      harmonic_m: mover.harmonicReplicates,
      lower: mover.lower,
      upper: mover.upper,
      lower_limit_ci95: mover.lowerInterval,
      upper_limit_ci95: mover.upperInterval,
    }
  },
  limits_replicates_true_value_constant: (s) => {
    const answer = replicateLimitsConstant(replicatesByMethodOf(s))
    const { bias, sd } = answer
    return {
      bias,
      bias_ci95: answer.biasInterval,
      var_subject_mean_differences: answer.varianceOfMeanDifferences,
      msw_a: answer.meanSquareWithinFirst,
      msw_b: answer.meanSquareWithinSecond,
      sd,
      'lower_1.96': bias - 1.96 * sd,
      'upper_1.96': bias + 1.96 * sd,
      mover: {
        lower: answer.lower,
        upper: answer.upper,
        lower_limit_ci95: answer.lowerInterval,
        upper_limit_ci95: answer.upperInterval,
      },
    }
  },
}
