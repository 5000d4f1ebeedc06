import { moments } from '../description/moments.ts'
import { quantile } from '../description/quantile.ts'
import type { Interval } from '../Interval.ts'

/**
 * Percentile interval and standard error from bootstrap replicates (at least two).
 * Source: Efron & Tibshirani 1993, An Introduction to the Bootstrap, ch. 13.
 */
export function percentileInterval(
  replicates: Float64Array,
  level: number,
): Interval & { standardError: number } {
  const sorted = replicates.slice().sort()
  const tail = (1 - level) / 2
  return {
    lower: quantile(sorted, tail),
    upper: quantile(sorted, 1 - tail),
    standardError: moments(sorted).sd,
  }
}
