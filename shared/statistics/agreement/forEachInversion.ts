/**
 * Calls `visit` for each pair of positions i < j with keys[i] > keys[j], giving the labels of the two;
 * O(n log n + pairs). `keys` and `labels` end up sorted by key.
 */
export function forEachInversion(
  keys: Float64Array,
  labels: Uint32Array,
  visit: (first: number, second: number) => void,
): void {
  const n = keys.length
  let fromKeys: Float64Array = keys
  let fromLabels: Uint32Array = labels
  let toKeys: Float64Array = new Float64Array(n)
  let toLabels: Uint32Array = new Uint32Array(n)
  for (let width = 1; width < n; width *= 2) {
    for (let start = 0; start < n; start += 2 * width) {
      const middle = Math.min(start + width, n)
      const end = Math.min(start + 2 * width, n)
      let left = start
      let right = middle
      for (let k = start; k < end; k++) {
        let taken: number
        if (left < middle && (right >= end || fromKeys[left]! <= fromKeys[right]!)) taken = left++
        else {
          taken = right++
          for (let i = left; i < middle; i++) visit(fromLabels[i]!, fromLabels[taken]!)
        }
        toKeys[k] = fromKeys[taken]!
        toLabels[k] = fromLabels[taken]!
      }
    }
    const swapKeys = fromKeys
    fromKeys = toKeys
    toKeys = swapKeys
    const swapLabels = fromLabels
    fromLabels = toLabels
    toLabels = swapLabels
  }
  if (fromKeys !== keys) {
    keys.set(fromKeys)
    labels.set(fromLabels)
  }
}
