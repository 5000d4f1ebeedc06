/**
 * Draws bootstrap samples of one class of a ROC curve. Each call draws as many subjects as there are,
 * with replacement, and gives the sample's counts along the curve (in one array that is used again).
 * @param cumulative the class's counts along the curve, starting with 0
 */
export function countResampler(cumulative: Int32Array, random: () => number): () => Int32Array {
  const n = cumulative[cumulative.length - 1]!
  // how often each subject was drawn; 16 bits keep the table small enough to stay near the processor
  const drawn = new Uint16Array(n)
  const upTo = new Int32Array(n + 1)
  const sample = new Int32Array(cumulative.length)
  return () => {
    drawn.fill(0)
    for (let i = 0; i < n; i++) drawn[Math.floor(random() * n)]!++
    for (let i = 0; i < n; i++) upTo[i + 1] = upTo[i]! + drawn[i]!
    // looked up rather than walked: which class a point belongs to is a coin toss to a branch predictor
    for (let k = 1; k < sample.length; k++) sample[k] = upTo[cumulative[k]!]!
    return sample
  }
}
