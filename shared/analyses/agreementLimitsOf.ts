import type { AgreementFigures, AgreementParameters } from '#shared/schemas/agreement.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import type { LimitsOfDifferences } from '#shared/statistics/agreement/limitsOfDifferences.ts'
import { nonparametricLimits } from '#shared/statistics/agreement/nonparametricLimits.ts'
import { percentLimits } from '#shared/statistics/agreement/percentLimits.ts'
import { ratioLimits } from '#shared/statistics/agreement/ratioLimits.ts'
import { regressionLimits } from '#shared/statistics/agreement/regressionLimits.ts'
import { quantileInterval } from '#shared/statistics/description/quantileInterval.ts'
import type { Interval } from '#shared/statistics/Interval.ts'
import { METHODS } from '#shared/statistics/METHODS.ts'

/** The lines of an agreement on one scale, from one pair a subject. */
export type LimitLines = Pick<
  AgreementFigures,
  | 'bias'
  | 'sd'
  | 'lowerLimit'
  | 'upperLimit'
  | 'centre'
  | 'alongMean'
  | 'biasMethod'
  | 'limitsMethod'
>
export type Pairs = { first: readonly number[]; second: readonly number[] }
type At = Pick<AgreementParameters, 'scale' | 'spread' | 'confidence'>

/** @throws StatisticsError too-few, non-finite, not-positive (ratio, percent), constant (regression) */
export function agreementLimitsOf(pairs: Pairs, { scale, spread, confidence }: At): LimitLines {
  const level = confidence
  switch (scale) {
    case 'difference':
      return levelLines(limitsOfAgreement(pairs, { level }))
    case 'percent':
      return levelLines(percentLimits(pairs, { level }))
    case 'ratio':
      return backFromLogs(levelLines(ratioLimits(pairs, { level }).logScale))
    case 'nonparametric':
      return percentileLines(pairs, level)
    case 'regression':
      return slopingLines(pairs, spread, level)
  }
}

const LEVEL = { centre: null, alongMean: [] }

const lineOf = (estimate: number, { lower, upper }: Interval) => ({
  estimate,
  lower,
  upper,
  slope: 0,
})

function levelLines(found: LimitsOfDifferences): LimitLines {
  return {
    ...LEVEL,
    bias: lineOf(found.bias, found.biasInterval),
    sd: found.sd,
    lowerLimit: lineOf(found.lower, found.exact.lower),
    upperLimit: lineOf(found.upper, found.exact.upper),
    biasMethod: AGREEMENT_METHODS.t.name,
    limitsMethod: METHODS.limitsExact.name,
  }
}

/** Lines of logarithms as ratios; the SD stays that of the logarithms. */
export function backFromLogs(lines: LimitLines): LimitLines {
  const back = ({ estimate, lower, upper }: LimitLines['bias']) => ({
    estimate: Math.exp(estimate),
    lower: lower === null ? null : Math.exp(lower),
    upper: upper === null ? null : Math.exp(upper),
    slope: 0,
  })
  return {
    ...lines,
    bias: back(lines.bias),
    lowerLimit: back(lines.lowerLimit),
    upperLimit: back(lines.upperLimit),
  }
}

function percentileLines(pairs: Pairs, level: number): LimitLines {
  const { sd } = limitsOfAgreement(pairs, { level })
  const { lower, median, upper } = nonparametricLimits(pairs)
  const sorted = Float64Array.from(pairs.first, (value, at) => value - pairs.second[at]!).sort()
  const line = (estimate: number, p: number) => {
    const bounds = quantileInterval(sorted, p, { level })
    return { estimate, lower: bounds.lower, upper: bounds.upper, slope: 0 }
  }
  return {
    ...LEVEL,
    bias: line(median, 0.5),
    sd,
    lowerLimit: line(lower, 0.025),
    upperLimit: line(upper, 0.975),
    biasMethod: AGREEMENT_METHODS.orderStatistics.name,
    limitsMethod: AGREEMENT_METHODS.orderStatistics.name,
  }
}

function slopingLines(pairs: Pairs, spread: At['spread'], level: number): LimitLines {
  const found = regressionLimits(pairs, spread, { level })
  const means = pairs.first.map((value, at) => (value + pairs.second[at]!) / 2)
  const centre = means.reduce((sum, mean) => sum + mean, 0) / means.length
  const { slopes } = found
  const at = (mean: number) => {
    const { bias, lower, upper } = found.at(mean)
    return {
      bias: { ...bias, slope: slopes.bias },
      lowerLimit: { ...lower, slope: slopes.lower },
      upperLimit: { ...upper, slope: slopes.upper },
    }
  }
  let smallest = Number.POSITIVE_INFINITY
  let largest = Number.NEGATIVE_INFINITY
  for (const mean of means) {
    smallest = Math.min(smallest, mean)
    largest = Math.max(largest, mean)
  }
  return {
    ...at(centre),
    sd: found.residualSd,
    centre,
    alongMean: [smallest, centre, largest].map((mean) => ({ mean, ...at(mean) })),
    biasMethod: AGREEMENT_METHODS.regression.name,
    limitsMethod: AGREEMENT_METHODS.regression.name,
  }
}
