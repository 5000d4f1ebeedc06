/**
 * x ln(x/m) + m − x without cancellation where x is near m (Loader's bd0), for x, m > 0.
 * Source: Loader 2000, "Fast and accurate computation of binomial probabilities".
 */
export function deviance(x: number, m: number): number {
  if (Math.abs(x - m) < 0.1 * (x + m)) {
    const v = (x - m) / (x + m)
    let sum = (x - m) * v
    let term = 2 * x * v
    for (let j = 1; j < 1000; j++) {
      term *= v * v
      const next = sum + term / (2 * j + 1)
      if (next === sum) return next
      sum = next
    }
  }
  return x * Math.log(x / m) + m - x
}
