/**
 * Draws bootstrap samples of one class of a ROC curve. Each call draws as many subjects as there are,
 * with replacement, and gives the sample's counts along the curve (in one array that is used again).
 * @param cumulative the class's counts along the curve, starting with 0
 */
export function countResampler(cumulative: Int32Array, random: () => number): () => Int32Array {
  const n = cumulative[cumulative.length - 1]!
  // how often each subject was drawn; 16 bits keep the table small enough to stay near the processor
  const drawn = new Uint16Array(n)
  const sample = new Int32Array(cumulative.length)
  return () => {
    drawn.fill(0)
    for (let i = 0; i < n; i++) drawn[Math.floor(random() * n)]!++
    let sum = 0
    let subject = 0
    for (let k = 1; k < cumulative.length; k++) {
      const end = cumulative[k]!
      while (subject < end) sum += drawn[subject++]!
      sample[k] = sum
    }
    return sample
  }
}
