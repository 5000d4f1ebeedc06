import type { LevelOption } from '../Interval.ts'
import type { ProportionMethod } from '../proportions/proportionEstimate.ts'
import { requireCount } from '../requireCount.ts'
import { type AccuracyAtCutOff, accuracyAtCutOff } from './accuracyAtCutOff.ts'
import type { TwoByTwo } from './twoByTwo.ts'

export type ReferenceIndeterminates = {
  /** The table of those whose reference outcome is indeterminate. */
  indeterminate: { indexPositive: number; indexNegative: number }
  leftOut: AccuracyAtCutOff
  /** Every indeterminate outcome taken to agree with the index test, and to disagree with it. */
  best: AccuracyAtCutOff
  worst: AccuracyAtCutOff
}

/**
 * Accuracy where some reference outcomes are indeterminate: left out, and the two bounds within which
 * every way to resolve them lies.
 * @throws StatisticsError 'out-of-range'
 * Source: worst and best case as in Begg, Greenes & Iglewicz 1986, J Chronic Dis 39:575.
 */
export function referenceIndeterminates(
  table: TwoByTwo,
  indeterminate: { indexPositive: number; indexNegative: number },
  options: LevelOption & { interval?: ProportionMethod } = {},
): ReferenceIndeterminates {
  const { indexPositive, indexNegative } = indeterminate
  requireCount(indexPositive, 'Each count')
  requireCount(indexNegative, 'Each count')
  const best = {
    ...table,
    truePositives: table.truePositives + indexPositive,
    trueNegatives: table.trueNegatives + indexNegative,
  }
  const worst = {
    ...table,
    falsePositives: table.falsePositives + indexPositive,
    falseNegatives: table.falseNegatives + indexNegative,
  }
  return {
    indeterminate,
    leftOut: accuracyAtCutOff(table, options),
    best: accuracyAtCutOff(best, options),
    worst: accuracyAtCutOff(worst, options),
  }
}
