/**
 * Number of positions i < j with keys[i] > keys[j], by merge sort: O(n log n). `keys` ends up sorted.
 * Source: Knuth 1998, The Art of Computer Programming 3, section 5.2.4.
 */
export function countInversions(keys: Float64Array): number {
  const n = keys.length
  let from: Float64Array = keys
  let to: Float64Array = new Float64Array(n)
  let count = 0
  for (let width = 1; width < n; width *= 2) {
    for (let start = 0; start < n; start += 2 * width) {
      const middle = Math.min(start + width, n)
      const end = Math.min(start + 2 * width, n)
      let left = start
      let right = middle
      for (let k = start; k < end; k++) {
        if (left < middle && (right >= end || from[left]! <= from[right]!)) to[k] = from[left++]!
        else {
          count += middle - left
          to[k] = from[right++]!
        }
      }
    }
    const swap = from
    from = to
    to = swap
  }
  if (from !== keys) keys.set(from)
  return count
}
