/**
 * The k-th smallest value (k from 1) by partitioning; linear on average. `values` is reordered.
 * Source: Hoare 1961 (Find); three-way partition as in Bentley & McIlroy 1993.
 */
export function nthSmallest(values: Float64Array, k: number): number {
  let low = 0
  let high = values.length - 1
  const target = k - 1
  while (low < high) {
    const pivot = medianOfThree(values[low]!, values[(low + high) >>> 1]!, values[high]!)
    let below = low
    let above = high
    let i = low
    while (i <= above) {
      const value = values[i]!
      if (value < pivot) {
        values[i++] = values[below]!
        values[below++] = value
      } else if (value > pivot) {
        values[i] = values[above]!
        values[above--] = value
      } else i++
    }
    if (target < below) high = below - 1
    else if (target > above) low = above + 1
    else return pivot
  }
  return values[target]!
}

function medianOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c))
}
