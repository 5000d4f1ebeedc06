import { requireFinite } from '../requireFinite.ts'
import { radixSort } from './radixSort.ts'

/** Below this the digits' tables cost more than a comparison sort. */
const WORTH_A_RADIX_SORT = 4000

/**
 * A copy sorted from smallest to largest; the input is left as it was.
 * @throws StatisticsError 'non-finite'
 */
export function sortedValues(values: ArrayLike<number>, what: string): Float64Array {
  requireFinite(values, what)
  const copy = values instanceof Float64Array ? values.slice() : Float64Array.from(values)
  return copy.length < WORTH_A_RADIX_SORT ? copy.sort() : radixSort(copy, null).values
}
