import { formatEstimate, formatInterval, formatProbability, NOT_ESTIMABLE } from './numbers.ts'

type Comparison = {
  first: number
  second: number
  difference: { estimate: number; lower: number | null; upper: number | null; note: string | null }
  statistic: number | null
  degreesOfFreedom: number | null
  p: number | null
  pAdjusted: number | null
  permutation: { p: number; permutations: number; seed: number } | null
}

/** How a comparison of two areas is written: one wording for the screen and the printed page. */
export function comparisonTexts(
  { first, second, difference, statistic, degreesOfFreedom, p, pAdjusted, permutation }: Comparison,
  labels: readonly string[],
) {
  const { estimate, lower, upper } = difference
  const test = degreesOfFreedom === null ? 'z' : `t on ${formatEstimate(degreesOfFreedom, 1)} df`
  return {
    pair: `${labels[first]} less ${labels[second]}`,
    difference: formatEstimate(estimate),
    interval: lower === null ? NOT_ESTIMABLE : formatInterval(lower, upper),
    test: statistic === null ? NOT_ESTIMABLE : `${test} = ${formatEstimate(statistic, 2)}`,
    p: p === null ? NOT_ESTIMABLE : formatProbability(p),
    adjusted: pAdjusted === null ? '' : formatProbability(pAdjusted),
    /** A share of none of the permutations is only known to be below one in so many. */
    permutation: permutation
      ? permutation.p === 0
        ? `below ${1 / permutation.permutations}`
        : formatProbability(permutation.p)
      : '',
  }
}
