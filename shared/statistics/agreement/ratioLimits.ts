import type { Interval, LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import {
  type LimitIntervals,
  type LimitsOfDifferences,
  limitsOfDifferences,
} from './limitsOfDifferences.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

export type RatioLimits = {
  /** Of ln first − ln second. */
  logScale: LimitsOfDifferences
  /** Back-transformed: geometric mean of first/second, its limits and their exact intervals. */
  ratio: number
  lower: number
  upper: number
  ratioInterval: Interval
  exact: LimitIntervals
}

/**
 * Limits of agreement for the ratio first/second, where the spread grows with the size: computed on
 * natural logarithms and taken back.
 * @param pairs n ≥ 3 pairs of positive values in one unit
 * @throws StatisticsError as limitsOfAgreement, and 'not-positive'
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135, section 3.1.
 */
export function ratioLimits(
  pairs: Pairs,
  options: LevelOption & { coverage?: number } = {},
): RatioLimits {
  requirePairs(pairs, 3)
  const { first, second } = pairs
  for (let i = 0; i < first.length; i++) {
    if (first[i]! <= 0 || second[i]! <= 0) {
      throw new StatisticsError(
        'not-positive',
        `A ratio needs values above 0; pair ${i + 1} has one that is not.`,
      )
    }
  }
  const logScale = limitsOfDifferences(
    Float64Array.from(first, (value, i) => Math.log(value) - Math.log(second[i]!)),
    options,
  )
  const back = ({ lower, upper }: Interval): Interval => ({
    lower: Math.exp(lower),
    upper: Math.exp(upper),
  })
  return {
    logScale,
    ratio: Math.exp(logScale.bias),
    ...back(logScale),
    ratioInterval: back(logScale.biasInterval),
    exact: { lower: back(logScale.exact.lower), upper: back(logScale.exact.upper) },
  }
}
