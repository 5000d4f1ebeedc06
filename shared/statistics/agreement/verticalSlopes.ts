import { sortedOrder } from '../description/sortedOrder.ts'
import { countInversions } from './countInversions.ts'

export type VerticalSlopes = {
  /** Pairs of points with the same x. */
  pairs: number
  identicalPoints: number
  /** +∞ and −∞ by the sign of y(i) − y(j) for i < j in the order given. */
  upwards: number
  downwards: number
}

/** Counts the pairs of points that lie above each other, in O(n log n). */
export function verticalSlopes(x: Float64Array, y: Float64Array): VerticalSlopes {
  const order = sortedOrder(x, 'The x values')
  const found = { pairs: 0, identicalPoints: 0, upwards: 0, downwards: 0 }
  for (let start = 0; start < order.length; ) {
    let end = start + 1
    while (end < order.length && x[order[end]!] === x[order[start]!]) end++
    const size = end - start
    if (size > 1) {
      // the sort is stable, so the group stands in the order given
      const heights = Float64Array.from(order.subarray(start, end), (i) => y[i]!)
      const pairs = (size * (size - 1)) / 2
      const upwards = countInversions(heights)
      const identical = tiedPairs(heights)
      found.pairs += pairs
      found.identicalPoints += identical
      found.upwards += upwards
      found.downwards += pairs - identical - upwards
    }
    start = end
  }
  return found
}

function tiedPairs(sorted: Float64Array): number {
  let pairs = 0
  let run = 0
  for (let i = 1; i < sorted.length; i++) {
    run = sorted[i] === sorted[i - 1] ? run + 1 : 0
    pairs += run
  }
  return pairs
}
