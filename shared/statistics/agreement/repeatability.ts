import { chiSquaredQuantile } from '../distributions/chiSquaredQuantile.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type Groups, type OneWayAnalysis, oneWayAnalysis } from './oneWayAnalysis.ts'

export type Repeatability = {
  analysis: OneWayAnalysis
  withinSubjectSd: number
  withinSubjectSdInterval: Interval
  /** z·√2·SD: two readings of one subject differ by less in 95 % of pairs. */
  repeatabilityCoefficient: number
  /** Within-subject SD in percent of the grand mean; null at a mean of 0. */
  cvPercent: number | null
  /** Root mean square of the subjects' own CVs (subjects with at least two values). */
  rootMeanSquareCvPercent: number | null
  /** From the SD of natural logarithms: exp(SD) − 1, and √(exp(SD²) − 1); null unless all values > 0. */
  cvLogPercentExp: number | null
  cvLogPercentLognormal: number | null
  /** (MSB − MSW)/m0; negative when subjects differ less than their replicates. */
  betweenSubjectVariance: number
  /** Reliability of a single reading, ICC(1,1) with m0; null where nothing varies. */
  reliability: number | null
  notDefined: NotDefined | null
}

/**
 * How well one method repeats itself within subjects, from a one-way analysis of variance.
 * @param groups replicates of each subject, one unit, at least two subjects and one with two values
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: Bland & Altman 1996, BMJ 313:744; 1996, BMJ 313:106 (CV from logarithms).
 */
export function repeatability(groups: Groups, { level = 0.95 }: LevelOption = {}): Repeatability {
  const analysis = oneWayAnalysis(groups)
  const { meanSquareBetween: msb, meanSquareWithin: msw, dfWithin, grandMean } = analysis
  if (msw === null) {
    throw new StatisticsError('too-few', 'Repeatability needs subjects with a second reading.')
  }
  const m0 = analysis.effectiveReplicates
  const withinSubjectSd = Math.sqrt(msw)
  const tail = (1 - level) / 2
  const sumSquares = msw * dfWithin
  const spread = msb + (m0 - 1) * msw
  const logSd = withinSdOfLogs(groups)
  return {
    analysis,
    withinSubjectSd,
    withinSubjectSdInterval: {
      lower: Math.sqrt(sumSquares / chiSquaredQuantile(1 - tail, dfWithin)),
      upper: Math.sqrt(sumSquares / chiSquaredQuantile(tail, dfWithin)),
    },
    repeatabilityCoefficient: zFor(0.95) * Math.SQRT2 * withinSubjectSd,
    cvPercent: grandMean === 0 ? null : (100 * withinSubjectSd) / grandMean,
    rootMeanSquareCvPercent: rootMeanSquareCv(groups),
    cvLogPercentExp: logSd === null ? null : 100 * (Math.exp(logSd) - 1),
    cvLogPercentLognormal: logSd === null ? null : 100 * Math.sqrt(Math.exp(logSd * logSd) - 1),
    betweenSubjectVariance: (msb - msw) / m0,
    reliability: spread === 0 ? null : (msb - msw) / spread,
    notDefined: reason(logSd, spread),
  }
}

function withinSdOfLogs(groups: Groups): number | null {
  const positive = groups.every((values) => Array.from(values).every((v) => v > 0))
  if (!positive) return null
  const logs = groups.map((values) => Float64Array.from(values, (v) => Math.log(v)))
  const { meanSquareWithin } = oneWayAnalysis(logs)
  return meanSquareWithin === null ? null : Math.sqrt(meanSquareWithin)
}

function rootMeanSquareCv(groups: Groups): number | null {
  let sum = 0
  let counted = 0
  for (const group of groups) {
    const values = Array.from(group)
    if (values.length < 2) continue
    const mean = values.reduce((a, b) => a + b, 0) / values.length
    if (mean === 0) return null
    const variance = values.reduce((s, v) => s + (v - mean) ** 2, 0) / (values.length - 1)
    sum += variance / (mean * mean)
    counted++
  }
  return 100 * Math.sqrt(sum / counted)
}

function reason(logSd: number | null, spread: number): NotDefined | null {
  if (logSd === null) {
    return { code: 'not-positive', sentence: 'A CV from logarithms needs values above 0.' }
  }
  if (spread > 0) return null
  return { code: 'zero-variance', sentence: 'Nothing varies, so there is no reliability.' }
}
