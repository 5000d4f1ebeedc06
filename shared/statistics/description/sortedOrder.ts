import { requireFinite } from '../requireFinite.ts'
import { radixSort } from './radixSort.ts'

/** Below this the digits' tables cost more than a comparison sort. */
const WORTH_A_RADIX_SORT = 500

/**
 * The positions of the values from smallest to largest, equal values in the order given; linear time.
 * @throws StatisticsError 'non-finite'
 */
export function sortedOrder(values: Float64Array, what: string): Uint32Array {
  requireFinite(values, what)
  const n = values.length
  const positions = new Uint32Array(n)
  for (let i = 0; i < n; i++) positions[i] = i
  if (n < WORTH_A_RADIX_SORT) return positions.sort((a, b) => values[a]! - values[b]! || a - b)
  // + 0 turns −0 into 0, so that the two are equal to the sort as well
  const copy = new Float64Array(n)
  for (let i = 0; i < n; i++) copy[i] = values[i]! + 0
  return radixSort(copy, positions).labels!
}
