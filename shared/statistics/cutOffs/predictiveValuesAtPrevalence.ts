import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { TwoByTwo } from './twoByTwo.ts'

export type PredictiveValue = {
  estimate: number | null
  lower: number | null
  upper: number | null
  method: 'logit method (Mercaldo)'
  notDefined: NotDefined | null
}

export type PredictiveValuesAtPrevalence = {
  prevalence: number
  positive: PredictiveValue
  negative: PredictiveValue
}

/**
 * Predictive values that the table's sensitivity and specificity imply at a stated prevalence, by
 * Bayes, with intervals on the logit scale (standard logit).
 * @param prevalence strictly between 0 and 1
 * @throws StatisticsError 'out-of-range', 'one-class'
 * Source: Mercaldo, Lau & Zhou 2007, Stat Med 26:2170.
 */
export function predictiveValuesAtPrevalence(
  table: TwoByTwo,
  prevalence: number,
  { level = 0.95 }: LevelOption = {},
): PredictiveValuesAtPrevalence {
  const { truePositives: tp, falsePositives: fp, falseNegatives: fn, trueNegatives: tn } = table
  for (const count of [tp, fp, fn, tn]) requireCount(count, 'Each cell of the table')
  requireProbability(prevalence, 'The prevalence')
  if (tp + fn === 0 || tn + fp === 0) {
    throw new StatisticsError('one-class', 'Both reference outcomes are needed.')
  }
  const z = zFor(level)
  const present = tp + fn
  const absent = tn + fp
  return {
    prevalence,
    positive: predictiveValue({
      right: (tp / present) * prevalence,
      wrong: (fp / absent) * (1 - prevalence),
      // var logit PPV = (1−Se)/(Se·n1) + Sp/((1−Sp)·n0)
      variance: fn / (tp * present) + tn / (fp * absent),
      z,
    }),
    negative: predictiveValue({
      right: (tn / absent) * (1 - prevalence),
      wrong: (fn / present) * prevalence,
      variance: tp / (fn * present) + fp / (tn * absent),
      z,
    }),
  }
}

function predictiveValue(parts: {
  right: number
  wrong: number
  variance: number
  z: number
}): PredictiveValue {
  const { right, wrong, variance, z } = parts
  const method = 'logit method (Mercaldo)'
  if (right + wrong === 0) {
    const sentence = 'The table holds no such result, so there is no predictive value.'
    const notDefined: NotDefined = { code: 'zero-denominator', sentence }
    return { estimate: null, lower: null, upper: null, method, notDefined }
  }
  const estimate = right / (right + wrong)
  if (!Number.isFinite(variance) || right === 0 || wrong === 0) {
    const sentence = 'A cell of the table is empty, so the logit method gives no interval.'
    const notDefined: NotDefined = { code: 'zero-cell', sentence }
    return { estimate, lower: null, upper: null, method, notDefined }
  }
  const half = z * Math.sqrt(variance)
  const odds = right / wrong
  const lower = 1 / (1 + Math.exp(half) / odds)
  const upper = 1 / (1 + Math.exp(-half) / odds)
  return { estimate, lower, upper, method, notDefined: null }
}
