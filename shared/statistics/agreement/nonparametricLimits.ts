import { quantile } from '../description/quantile.ts'
import { requireProbability } from '../requireProbability.ts'
import { limitsOfAgreement } from './limitsOfAgreement.ts'
import type { Pairs } from './Pairs.ts'

export type NonparametricLimits = {
  n: number
  lower: number
  median: number
  upper: number
  /** Differences that lie inside the limits of agreement bias ∓ z·SD. */
  insideParametric: number
}

/**
 * The middle 95 % (`coverage`) of the differences by their percentiles, for differences far from
 * normal; with few pairs the percentiles are little more than the extremes.
 * @param pairs n ≥ 3 pairs in one unit
 * @throws StatisticsError as limitsOfAgreement
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135, section 4.
 */
export function nonparametricLimits(
  pairs: Pairs,
  { coverage = 0.95 }: { coverage?: number } = {},
): NonparametricLimits {
  requireProbability(coverage, 'The coverage')
  const { lower, upper } = limitsOfAgreement(pairs, { coverage })
  const differences = Float64Array.from(pairs.first, (v, i) => v - pairs.second[i]!).sort()
  const tail = (1 - coverage) / 2
  return {
    n: differences.length,
    lower: quantile(differences, tail),
    median: quantile(differences, 0.5),
    upper: quantile(differences, 1 - tail),
    insideParametric: differences.filter((d) => d >= lower && d <= upper).length,
  }
}
