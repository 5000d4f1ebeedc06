import type { LevelOption } from '../Interval.ts'
import type { ProportionEstimate, ProportionMethod } from '../proportions/proportionEstimate.ts'
import { proportionEstimate } from '../proportions/proportionEstimate.ts'
import { requireCount } from '../requireCount.ts'
import { type AccuracyAtCutOff, accuracyAtCutOff } from './accuracyAtCutOff.ts'
import type { TwoByTwo } from './twoByTwo.ts'

/** Index results that are neither positive nor negative, by reference outcome. */
export type IndexTrouble = {
  indeterminatePresent: number
  indeterminateAbsent: number
  /** Subjects with no valid index result at all: a category of its own, never positive or negative. */
  noValidPresent: number
  noValidAbsent: number
}

export type WithIndeterminates = {
  /** Indeterminate results left out. */
  leftOut: AccuracyAtCutOff
  countedPositive: AccuracyAtCutOff
  countedNegative: AccuracyAtCutOff
  /** Share of subjects with a determinate result, and with any valid result. */
  determinate: ProportionEstimate
  valid: ProportionEstimate
}

/**
 * Accuracy with indeterminate index results left out, counted once as positive and once as negative,
 * beside how many there are.
 * @throws StatisticsError 'out-of-range'
 * Source: Shinkins et al 2013, BMJ 346:f2778; STARD 2015, items 15 and 16.
 */
export function withIndeterminates(
  table: TwoByTwo,
  trouble: IndexTrouble,
  options: LevelOption & { interval?: ProportionMethod } = {},
): WithIndeterminates {
  const { indeterminatePresent, indeterminateAbsent, noValidPresent, noValidAbsent } = trouble
  for (const count of Object.values(trouble)) requireCount(count, 'Each count')
  const clear =
    table.truePositives + table.falsePositives + table.falseNegatives + table.trueNegatives
  const indeterminate = indeterminatePresent + indeterminateAbsent
  const all = clear + indeterminate + noValidPresent + noValidAbsent
  const countedPositive = {
    ...table,
    truePositives: table.truePositives + indeterminatePresent,
    falsePositives: table.falsePositives + indeterminateAbsent,
  }
  const countedNegative = {
    ...table,
    falseNegatives: table.falseNegatives + indeterminatePresent,
    trueNegatives: table.trueNegatives + indeterminateAbsent,
  }
  return {
    leftOut: accuracyAtCutOff(table, options),
    countedPositive: accuracyAtCutOff(countedPositive, options),
    countedNegative: accuracyAtCutOff(countedNegative, options),
    determinate: proportionEstimate(clear, all, options),
    valid: proportionEstimate(clear + indeterminate, all, options),
  }
}
