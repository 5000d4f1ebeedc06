/** Bernoulli terms B(2k)/(2k(2k−1)) of Stirling's series. */
const TERMS = [
  1 / 12,
  -1 / 360,
  1 / 1260,
  -1 / 1680,
  1 / 1188,
  -691 / 360360,
  1 / 156,
  -3617 / 122400,
]
const HALF_LOG_TWO_PI = 0.9189385332046727

/**
 * What Stirling's formula leaves out: ln n! − (n + ½) ln n + n − ½ ln 2π, for real n > 0.
 * Below 15 it comes from the value at n + 1, going up to where the series is exact.
 * Source: Loader 2000, "Fast and accurate computation of binomial probabilities"; DLMF 5.11.1.
 */
export function stirlingError(n: number): number {
  if (n < 15) {
    let shifted = n
    let product = 1
    while (shifted < 15) {
      shifted += 1
      product *= shifted
    }
    const logFactorial =
      (shifted + 0.5) * Math.log(shifted) -
      shifted +
      HALF_LOG_TWO_PI +
      stirlingError(shifted) -
      Math.log(product)
    return logFactorial - (n + 0.5) * Math.log(n) + n - HALF_LOG_TWO_PI
  }
  const square = 1 / (n * n)
  let sum = 0
  for (let k = TERMS.length - 1; k >= 0; k--) sum = sum * square + TERMS[k]!
  return sum / n
}
