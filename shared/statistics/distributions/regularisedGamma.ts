import { StatisticsError } from '../StatisticsError.ts'
import { deviance } from './deviance.ts'
import { stirlingError } from './stirlingError.ts'

const TINY = 1e-300

/**
 * The regularised incomplete gamma functions P(a, x) (lower) and Q(a, x) (upper), a > 0, x ≥ 0,
 * and the density at x; the smaller of the two is the one computed, so that tails keep their digits.
 * Source: NIST DLMF 8.11.4 (series) and 8.9.2 (continued fraction, Lentz's method).
 * @throws StatisticsError 'no-convergence'
 */
export function regularisedGamma(
  a: number,
  x: number,
): { lower: number; upper: number; density: number } {
  if (x <= 0) return { lower: 0, upper: 1, density: 0 }
  // x^a e^−x / Γ(a), written as a Poisson term to keep its digits when a is large
  const front = Math.exp(-stirlingError(a) - deviance(a, x)) * Math.sqrt(a / (2 * Math.PI))
  const density = front / x
  // so far out that the smaller tail is below the smallest number
  if (front === 0) return { lower: x < a ? 0 : 1, upper: x < a ? 1 : 0, density }
  if (x < a + 1) {
    let term = 1 / a
    let sum = term
    for (let k = 1; k < 100_000; k++) {
      term *= x / (a + k)
      sum += term
      if (term < sum * 1e-17) return { lower: sum * front, upper: 1 - sum * front, density }
    }
    throw new StatisticsError('no-convergence', 'The gamma distribution did not settle.')
  }
  let b = x + 1 - a
  let c = 1 / TINY
  let d = 1 / b
  let h = d
  for (let k = 1; k < 100_000; k++) {
    const an = -k * (k - a)
    b += 2
    d = 1 / nonZero(an * d + b)
    c = nonZero(b + an / c)
    const step = d * c
    h *= step
    if (Math.abs(step - 1) < 1e-16) return { lower: 1 - h * front, upper: h * front, density }
  }
  throw new StatisticsError('no-convergence', 'The gamma distribution did not settle.')
}

function nonZero(value: number): number {
  return Math.abs(value) < TINY ? TINY : value
}
