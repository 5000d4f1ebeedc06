import type { LevelOption } from '../Interval.ts'
import {
  type ProportionEstimate,
  type ProportionMethod,
  proportionEstimate,
} from '../proportions/proportionEstimate.ts'
import type { TwoByTwo } from './twoByTwo.ts'

export type ObservedPredictiveValues =
  | { shown: true; positive: ProportionEstimate; negative: ProportionEstimate }
  | { shown: false; sentence: string }

/**
 * Predictive values as observed, unless the design makes them meaningless: where subjects were sampled
 * by their outcome, the share with the condition is the investigator's choice.
 * @param sampling 'cohort' or 'byOutcome'
 * @throws StatisticsError 'out-of-range'
 * Source: Biesheuvel et al 2008, BMC Med Res Methodol 8:48.
 */
export function observedPredictiveValues(
  table: TwoByTwo,
  sampling: 'cohort' | 'byOutcome',
  options: LevelOption & { interval?: ProportionMethod } = {},
): ObservedPredictiveValues {
  if (sampling === 'byOutcome') {
    const sentence =
      'Predictive values as observed are left out: subjects were chosen by outcome, so the share of them with the condition is the study’s own making.'
    return { shown: false, sentence }
  }
  const { truePositives, falsePositives, falseNegatives, trueNegatives } = table
  return {
    shown: true,
    positive: proportionEstimate(truePositives, truePositives + falsePositives, options),
    negative: proportionEstimate(trueNegatives, trueNegatives + falseNegatives, options),
  }
}
