import { differenceOnMean } from '#shared/statistics/agreement/differenceOnMean.ts'
import {
  type IntraclassCorrelation,
  intraclassCorrelations,
} from '#shared/statistics/agreement/intraclassCorrelations.ts'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import type {
  LimitIntervals,
  LimitsOfDifferences,
} from '#shared/statistics/agreement/limitsOfDifferences.ts'
import { linConcordance } from '#shared/statistics/agreement/linConcordance.ts'
import { nonparametricLimits } from '#shared/statistics/agreement/nonparametricLimits.ts'
import { pearson } from '#shared/statistics/agreement/pearson.ts'
import { percentLimits } from '#shared/statistics/agreement/percentLimits.ts'
import { ratioLimits } from '#shared/statistics/agreement/ratioLimits.ts'
import { shapiroWilk } from '#shared/statistics/agreement/shapiroWilk.ts'
import { spearman } from '#shared/statistics/agreement/spearman.ts'
import { pairsOf } from './agreementInput.ts'
import type { Actual } from './compare.ts'
import { orNull } from './orNull.ts'
import type { Quantities, Surroundings } from './Quantity.ts'

export const agreementQuantities: Quantities = {
  limits_of_agreement: (s) => limits(limitsOfAgreement(pairsOf(s))),
  limits_percent: (s) => limits(percentLimits(pairsOf(s))),
  limits_log_ratio: (s) => {
    const answer = ratioLimits(pairsOf(s))
    return {
      log_scale: limits(answer.logScale),
      ratio: {
        geometric_mean_ratio: answer.ratio,
        lower: answer.lower,
        upper: answer.upper,
        mean_ci95: answer.ratioInterval,
        lower_limit_ci95_exact: answer.exact.lower,
        upper_limit_ci95_exact: answer.exact.upper,
      },
    }
  },
  limits_nonparametric: (s) => {
    const answer = nonparametricLimits(pairsOf(s))
    return {
      'p2.5': answer.lower,
      median: answer.median,
      'p97.5': answer.upper,
      n_inside_parametric: answer.insideParametric,
    }
  },
  difference_on_mean: (s) => {
    const { line, slopeT, slopeP, spread } = differenceOnMean(pairsOf(s))
    return {
      intercept: line.intercept,
      intercept_se: line.interceptStandardError,
      slope: line.slope,
      slope_se: line.slopeStandardError,
      slope_t: slopeT,
      slope_p: slopeP,
      slope_ci95: line.slopeInterval,
      residual_sd: line.residualSd,
      r_squared: line.rSquared,
      abs_residual_intercept: spread.intercept,
      abs_residual_slope: spread.slope,
      abs_residual_slope_p: spread.p,
    }
  },
  correlation: (s) => {
    const { first, second } = pairsOf(s)
    const differences = first.map((value, i) => value - second[i]!)
    const means = first.map((value, i) => (value + second[i]!) / 2)
    const onMean = { first: differences, second: means }
    const plain = orNull(() => pearson({ first, second }))
    return {
      r: plain?.r ?? null,
      lower: plain?.interval?.lower ?? null,
      upper: plain?.interval?.upper ?? null,
      r_diff_mean: orNull(() => pearson(onMean))?.r ?? null,
      spearman_diff_mean: orNull(() => spearman(onMean))?.rho ?? null,
    }
  },
  shapiro_wilk_differences: (s) => {
    const { first, second } = pairsOf(s)
    const { w, p } = shapiroWilk(first.map((value, i) => value - second[i]!))
    return { w, p }
  },
  lin_ccc: (s) => {
    const answer = linConcordance(pairsOf(s))
    return {
      estimate: answer.estimate,
      z_transform_ci95: answer.interval,
      asymptotic_ci95: answer.asymptoticInterval,
      bias_correction_cb: answer.biasCorrection,
      scale_shift: answer.scaleShift,
      location_shift: answer.locationShift,
    }
  },
  icc: (s) => {
    const { first, second } = pairsOf(s)
    const table = Array.from(first, (value, i) => [value, second[i]!])
    const answer = intraclassCorrelations(table)
    return {
      icc_1_1: icc(answer.single1),
      icc_2_1: icc(answer.single2),
      icc_3_1: icc(answer.single3),
      icc_1_k: icc(answer.mean1),
      icc_2_k: icc(answer.mean2),
      icc_3_k: icc(answer.mean3),
    }
  },
  icc_all_six: (s) => {
    const answer = intraclassCorrelations(ratingsOf(s))
    const six = {
      ICC1: answer.single1,
      ICC2: answer.single2,
      ICC3: answer.single3,
      ICC1k: answer.mean1,
      ICC2k: answer.mean2,
      ICC3k: answer.mean3,
    }
    return Object.entries(six).map(([type, one]) => ({ type, ...icc(one) }))
  },
}

/** "j1..j4": all columns from the first to the last, complete rows. */
function ratingsOf({ record, table }: Surroundings): number[][] {
  const whole = table(record.dataset)
  const [from, to] = record.marker.split('..').map((name) => whole.columns.indexOf(name))
  const columns = whole.columns.slice(from!, to! + 1).map((name) => whole.numbers(name))
  return whole.rows
    .map((_, i) => columns.map((column) => column[i]!))
    .filter((row): row is number[] => row.every((value) => value !== null))
}

function icc({ estimate, lower, upper, f, df1, df2, p }: IntraclassCorrelation) {
  return { estimate, lower, upper, f, df1, df2, p }
}

function limits(answer: LimitsOfDifferences): Actual {
  const { n, bias, sd, exact, approximate1986, approximate1999, approximate1999Normal } = answer
  const intervals = (of: LimitIntervals) => ({
    lower_limit_ci95: of.lower,
    upper_limit_ci95: of.upper,
  })
  return {
    n,
    bias,
    sd,
    lower: answer.lower,
    upper: answer.upper,
    'lower_1.96': bias - 1.96 * sd,
    'upper_1.96': bias + 1.96 * sd,
    lower_2sd: bias - 2 * sd,
    upper_2sd: bias + 2 * sd,
    bias_se: answer.biasStandardError,
    bias_ci95: answer.biasInterval,
    bias_t: answer.t,
    bias_p: answer.p,
    approx_sqrt3: { se: approximate1986.standardError, ...intervals(approximate1986) },
    approx_1999: { se: approximate1999.standardError, ...intervals(approximate1999) },
    approx_1999_with_z: intervals(approximate1999Normal),
    exact_noncentral_t: {
      factor_inner: exact.innerFactor,
      factor_outer: exact.outerFactor,
      ...intervals(exact),
    },
  }
}
