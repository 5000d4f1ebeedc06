import { nthSmallest } from './nthSmallest.ts'

/**
 * Percentile with linear interpolation between the two nearest ranks, (n − 1)·p/100 from 0.
 * @param values its first `count` ≥ 1 elements are finite numbers, which are reordered on the way
 * Source: Hyndman & Fan 1996, Am Stat 50:361, definition 7 (from memory).
 */
export function percentileOf(values: Float64Array, count: number, percent: number): number {
  const rank = ((count - 1) * percent) / 100
  const below = Math.floor(rank)
  const lower = nthSmallest(values, count, below)
  const share = rank - below
  if (share === 0) return lower
  // Everything after `below` is at least as large: the next rank is the least of it.
  let upper = values[below + 1]!
  for (let at = below + 2; at < count; at++) {
    if (values[at]! < upper) upper = values[at]!
  }
  return lower + (upper - lower) * share
}
