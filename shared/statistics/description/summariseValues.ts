import { StatisticsError } from '../StatisticsError.ts'
import { moments } from './moments.ts'
import { quantile } from './quantile.ts'
import { sortedValues } from './sortedValues.ts'

export type ValueSummary = {
  n: number
  mean: number
  /** Divisor n − 1; null for one value. */
  sd: number | null
  smallest: number
  lowerQuartile: number
  median: number
  upperQuartile: number
  largest: number
}

/**
 * Mean, SD and quartiles (linear interpolation) in the values' unit.
 * @param values at least one finite value
 * @throws StatisticsError 'too-few', 'non-finite'
 */
export function summariseValues(values: ArrayLike<number>): ValueSummary {
  if (values.length === 0) throw new StatisticsError('too-few', 'There are no values to describe.')
  const sorted = sortedValues(values, 'The values')
  const { n, mean, sd } = moments(sorted)
  return {
    n,
    mean,
    sd: n < 2 ? null : sd,
    smallest: sorted[0]!,
    lowerQuartile: quantile(sorted, 0.25),
    median: quantile(sorted, 0.5),
    upperQuartile: quantile(sorted, 0.75),
    largest: sorted[n - 1]!,
  }
}
