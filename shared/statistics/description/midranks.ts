import { sortedOrder } from './sortedOrder.ts'

/**
 * Ranks 1…n in the order of the input, ties given their mean rank.
 * @throws StatisticsError 'non-finite'
 */
export function midranks(values: ArrayLike<number>): Float64Array {
  const numbers = Float64Array.from(values)
  const order = sortedOrder(numbers, 'The values')
  const ranks = new Float64Array(numbers.length)
  for (let start = 0; start < order.length; ) {
    let end = start
    while (end < order.length && numbers[order[end]!] === numbers[order[start]!]) end++
    for (let k = start; k < end; k++) ranks[order[k]!] = (start + 1 + end) / 2
    start = end
  }
  return ranks
}
