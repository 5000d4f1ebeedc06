/**
 * The value at position n (from 0) of the ascending order, found without sorting everything; the
 * array is reordered on the way: smaller or equal values before n, larger or equal ones after.
 * @param values its first `count` > n elements are finite numbers; the rest is left alone
 * Source: Hoare 1961, Algorithm 65: Find; pivot is the median of three.
 */
export function nthSmallest(values: Float64Array, count: number, n: number): number {
  let low = 0
  let high = count - 1
  while (low < high) {
    const pivot = medianOfThree(values[low]!, values[(low + high) >> 1]!, values[high]!)
    let left = low
    let right = high
    while (left <= right) {
      while (values[left]! < pivot) left++
      while (values[right]! > pivot) right--
      if (left <= right) {
        const swapped = values[left]!
        values[left++] = values[right]!
        values[right--] = swapped
      }
    }
    if (n <= right) high = right
    else if (n >= left) low = left
    else break
  }
  return values[n]!
}

function medianOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c))
}
