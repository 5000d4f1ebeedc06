import { requireFinite } from '../requireFinite.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type NetBenefit = {
  threshold: number
  truePositives: number
  falsePositives: number
  netBenefit: number
  treatAll: number
  treatNone: 0
  /** Net benefit divided by the prevalence. */
  standardised: number
}

/**
 * Net benefit of acting on a probability at or above each threshold, beside acting on all and on none.
 * Only meaningful where the data's prevalence is that of the people it is meant for.
 * @param probabilities predicted, by reference outcome, 0…1  @param thresholds each inside 0…1
 * @throws StatisticsError 'one-class', 'non-finite', 'out-of-range'
 * Source: Vickers & Elkin 2006, Med Decis Making 26:565.
 */
export function netBenefit(
  probabilities: { present: ArrayLike<number>; absent: ArrayLike<number> },
  thresholds: ArrayLike<number>,
): NetBenefit[] {
  const { present, absent } = probabilities
  if (present.length === 0 || absent.length === 0) {
    throw new StatisticsError('one-class', 'Both reference outcomes are needed.')
  }
  requireFinite(present, 'The probabilities')
  requireFinite(absent, 'The probabilities')
  const n = present.length + absent.length
  const prevalence = present.length / n
  return Array.from(thresholds, (threshold) => {
    requireProbability(threshold, 'A threshold probability')
    const truePositives = countAtLeast(present, threshold)
    const falsePositives = countAtLeast(absent, threshold)
    const odds = threshold / (1 - threshold)
    const benefit = truePositives / n - (falsePositives / n) * odds
    return {
      threshold,
      truePositives,
      falsePositives,
      netBenefit: benefit,
      treatAll: prevalence - (1 - prevalence) * odds,
      treatNone: 0,
      standardised: benefit / prevalence,
    }
  })
}

function countAtLeast(values: ArrayLike<number>, threshold: number): number {
  let count = 0
  for (let i = 0; i < values.length; i++) if (values[i]! >= threshold) count++
  return count
}
