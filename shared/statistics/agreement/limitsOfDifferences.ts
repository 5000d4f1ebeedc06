import { moments } from '../description/moments.ts'
import { noncentralTQuantile } from '../distributions/noncentralTQuantile.ts'
import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import { studentTTwoSided } from '../distributions/studentTTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** Intervals of the two limits by one method. */
export type LimitIntervals = { lower: Interval; upper: Interval }

export type LimitsOfDifferences = {
  n: number
  bias: number
  sd: number
  /** bias ∓ z·SD with z = 1.959963984540054 at coverage 0.95. */
  lower: number
  upper: number
  biasStandardError: number
  biasInterval: Interval
  /** Paired t test of the bias; null where the SD is 0. */
  t: number | null
  p: number | null
  /** Carkeet 2015, noncentral t; factors in SD from the bias. The interval to show. */
  exact: LimitIntervals & { innerFactor: number; outerFactor: number }
  /** Bland & Altman 1986: SE = √(3/n)·SD, with t(n − 1). */
  approximate1986: LimitIntervals & { standardError: number }
  /** Bland & Altman 1999: SE = √(1/n + z²/(2(n − 1)))·SD, with t(n − 1). */
  approximate1999: LimitIntervals & { standardError: number }
  /** The same with the normal multiplier in place of t. */
  approximate1999Normal: LimitIntervals
}

/**
 * Bias and limits of agreement of given differences.
 * @param differences n ≥ 3 finite values in one unit (or log ratios, or percent); results in that unit
 * @param options `level` of the intervals and `coverage` of the limits, 0.95 each unless given
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: Bland & Altman 1986, Lancet i:307; 1999, Stat Methods Med Res 8:135; Carkeet 2015, Optom Vis Sci 92:e71.
 */
export function limitsOfDifferences(
  differences: ArrayLike<number>,
  { level = 0.95, coverage = 0.95 }: LevelOption & { coverage?: number } = {},
): LimitsOfDifferences {
  if (differences.length < 3) {
    throw new StatisticsError(
      'too-few',
      `Limits of agreement need at least 3 differences; there are ${differences.length}.`,
    )
  }
  requireFinite(differences, 'The differences')
  const { n, mean: bias, sd } = moments(differences)
  const z = zFor(coverage)
  const tail = (1 - level) / 2
  const t = studentTQuantile(1 - tail, n - 1)
  const biasStandardError = sd / Math.sqrt(n)
  const limits = { lower: bias - z * sd, upper: bias + z * sd }
  const around = (half: number): LimitIntervals => ({
    lower: { lower: limits.lower - half, upper: limits.lower + half },
    upper: { lower: limits.upper - half, upper: limits.upper + half },
  })
  const se1986 = Math.sqrt(3 / n) * sd
  const se1999 = Math.sqrt(1 / n + (z * z) / (2 * (n - 1))) * sd
  const factor = (p: number) => noncentralTQuantile(p, n - 1, z * Math.sqrt(n)) / Math.sqrt(n)
  const innerFactor = factor(tail)
  const outerFactor = factor(1 - tail)
  const statistic = sd > 0 ? bias / biasStandardError : null
  return {
    n,
    bias,
    sd,
    ...limits,
    biasStandardError,
    biasInterval: { lower: bias - t * biasStandardError, upper: bias + t * biasStandardError },
    t: statistic,
    p: statistic === null ? null : studentTTwoSided(statistic, n - 1),
    exact: {
      innerFactor,
      outerFactor,
      lower: { lower: bias - outerFactor * sd, upper: bias - innerFactor * sd },
      upper: { lower: bias + innerFactor * sd, upper: bias + outerFactor * sd },
    },
    approximate1986: { standardError: se1986, ...around(t * se1986) },
    approximate1999: { standardError: se1999, ...around(t * se1999) },
    approximate1999Normal: around(zFor(level) * se1999),
  }
}
