/**
 * For each subject of a class, in the order of the curve, the curve's point at which it turns positive.
 * @param cumulative the class's counts along the curve, starting with 0
 */
export function pointOfEach(cumulative: Int32Array): Int32Array {
  const pointOf = new Int32Array(cumulative[cumulative.length - 1]!)
  for (let k = 1; k < cumulative.length; k++) {
    pointOf.fill(k, cumulative[k - 1]!, cumulative[k]!)
  }
  return pointOf
}
