import { regularisedBeta } from '../distributions/regularisedBeta.ts'
import type { LevelOption } from '../Interval.ts'
import { requireProbability } from '../requireProbability.ts'

export type QuantileInterval = {
  /** Null where no value is far enough out: there are too few values for this end. */
  lower: number | null
  upper: number | null
  /** Ranks of the bounds, 1 = smallest; 0 and n + 1 where there is no such value. */
  lowerRank: number
  upperRank: number
}

/**
 * An interval of the p-quantile without assuming any distribution: between two order statistics, each
 * end missed with a probability of at most (1 − level)/2 by the binomial distribution.
 * @param sorted n ≥ 1 finite values, smallest first  @param p strictly between 0 and 1
 * @throws StatisticsError 'out-of-range'
 * Source: Conover 1999, Practical Nonparametric Statistics, 3rd ed., section 3.2.
 */
export function quantileInterval(
  sorted: ArrayLike<number>,
  p: number,
  { level = 0.95 }: LevelOption = {},
): QuantileInterval {
  requireProbability(p, 'The share')
  requireProbability(level, 'The confidence level')
  const n = sorted.length
  const tail = (1 - level) / 2
  const lowerRank = firstCount(n, p, (atMost) => atMost > tail)
  const upperRank = firstCount(n, p, (atMost) => atMost >= 1 - tail) + 1
  return {
    lower: sorted[lowerRank - 1] ?? null,
    upper: sorted[upperRank - 1] ?? null,
    lowerRank,
    upperRank,
  }
}

/** The smallest k in 0…n for which P(at most k of n below the quantile) is large enough, by halving. */
function firstCount(n: number, p: number, enough: (atMost: number) => boolean): number {
  let least = 0
  let most = n
  while (least < most) {
    const middle = Math.floor((least + most) / 2)
    if (enough(atMost(middle, n, p))) most = middle
    else least = middle + 1
  }
  return least
}

function atMost(k: number, n: number, p: number): number {
  return k >= n ? 1 : regularisedBeta(1 - p, p, n - k, k + 1).lower
}
