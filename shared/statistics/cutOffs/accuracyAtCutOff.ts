import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import {
  type ProportionEstimate,
  type ProportionMethod,
  proportionEstimate,
} from '../proportions/proportionEstimate.ts'
import { requireCount } from '../requireCount.ts'
import { logRatio, type RatioEstimate } from './logRatio.ts'
import type { TwoByTwo } from './twoByTwo.ts'

export type AccuracyAtCutOff = {
  table: TwoByTwo
  sensitivity: ProportionEstimate
  specificity: ProportionEstimate
  /** As observed; hide both where subjects were sampled by outcome. */
  positivePredictiveValue: ProportionEstimate
  negativePredictiveValue: ProportionEstimate
  accuracy: ProportionEstimate
  youdenIndex: {
    estimate: number | null
    lower: number | null
    upper: number | null
    standardError: number | null
    method: 'Wald'
    notDefined: NotDefined | null
  }
  likelihoodRatioPositive: RatioEstimate
  likelihoodRatioNegative: RatioEstimate
  diagnosticOddsRatio: RatioEstimate
  /** With ½ added to each cell; defined whatever the cells. */
  diagnosticOddsRatioHalfAdded: RatioEstimate
}

/**
 * Everything that a two-by-two table says about a test, each with counts and interval.
 * Likelihood ratios by the log method (Simel 1991, J Clin Epidemiol 44:763), odds ratio by Woolf
 * (1955), with ½ added after Haldane (1956); Youden's index with its Wald interval.
 * @param table whole counts  @param options `level`, `interval` of the proportions (Wilson unless given)
 * @throws StatisticsError 'out-of-range'
 */
export function accuracyAtCutOff(
  table: TwoByTwo,
  { level = 0.95, interval = 'Wilson' }: LevelOption & { interval?: ProportionMethod } = {},
): AccuracyAtCutOff {
  const { truePositives: tp, falsePositives: fp, falseNegatives: fn, trueNegatives: tn } = table
  for (const count of [tp, fp, fn, tn]) requireCount(count, 'Each cell of the table')
  const z = zFor(level)
  const proportion = (x: number, n: number) => proportionEstimate(x, n, { level, interval })
  const sensitivity = proportion(tp, tp + fn)
  const specificity = proportion(tn, tn + fp)
  const missed = complement(sensitivity)
  const falseAlarms = complement(specificity)
  return {
    table,
    sensitivity,
    specificity,
    positivePredictiveValue: proportion(tp, tp + fp),
    negativePredictiveValue: proportion(tn, tn + fn),
    accuracy: proportion(tp + tn, tp + fp + fn + tn),
    youdenIndex: youdenIndex(sensitivity, specificity, z),
    likelihoodRatioPositive: logRatio({
      numerator: sensitivity.estimate,
      denominator: falseAlarms,
      variance: 1 / tp - 1 / (tp + fn) + 1 / fp - 1 / (fp + tn),
      z,
      method: 'log method (Simel)',
    }),
    likelihoodRatioNegative: logRatio({
      numerator: missed,
      denominator: specificity.estimate,
      variance: 1 / fn - 1 / (tp + fn) + 1 / tn - 1 / (fp + tn),
      z,
      method: 'log method (Simel)',
    }),
    diagnosticOddsRatio: oddsRatio(table, 0, z, 'log method (Woolf)'),
    diagnosticOddsRatioHalfAdded: oddsRatio(table, 0.5, z, 'log method, ½ added to each cell'),
  }
}

function complement({ numerator, denominator }: ProportionEstimate): number | null {
  return denominator === 0 ? null : (denominator - numerator) / denominator
}

function oddsRatio(table: TwoByTwo, added: number, z: number, method: string): RatioEstimate {
  const tp = table.truePositives + added
  const fp = table.falsePositives + added
  const fn = table.falseNegatives + added
  const tn = table.trueNegatives + added
  const variance = 1 / tp + 1 / fp + 1 / fn + 1 / tn
  return logRatio({ numerator: tp * tn, denominator: fp * fn, variance, z, method })
}

function youdenIndex(
  sensitivity: ProportionEstimate,
  specificity: ProportionEstimate,
  z: number,
): AccuracyAtCutOff['youdenIndex'] {
  const se = sensitivity.estimate
  const sp = specificity.estimate
  if (se === null || sp === null) {
    const sentence = 'One of the classes is empty, so there is no index.'
    const notDefined: NotDefined = { code: 'zero-denominator', sentence }
    const nothing = { estimate: null, lower: null, upper: null, standardError: null }
    return { ...nothing, method: 'Wald', notDefined }
  }
  const variance =
    (se * (1 - se)) / sensitivity.denominator + (sp * (1 - sp)) / specificity.denominator
  const standardError = Math.sqrt(variance)
  const estimate = se + sp - 1
  const lower = estimate - z * standardError
  const upper = estimate + z * standardError
  return { estimate, lower, upper, standardError, method: 'Wald', notDefined: null }
}
