import { StatisticsError } from '../StatisticsError.ts'
import { deviance } from './deviance.ts'
import { stirlingError } from './stirlingError.ts'

const TINY = 1e-300

/**
 * The regularised incomplete beta function I(x; a, b) (lower), its complement (upper) and the density
 * at x, for a, b > 0. `y` is 1 − x, given apart so that neither end loses digits.
 * jStat's ibeta stops at 3e-7 and rests on a gamma function good to 2e-10; hence this one.
 * Source: NIST DLMF 8.17.22 (continued fraction, Lentz's method); prefactor after Loader 2000.
 * @throws StatisticsError 'no-convergence'
 */
export function regularisedBeta(
  x: number,
  y: number,
  a: number,
  b: number,
): { lower: number; upper: number; density: number } {
  if (x <= 0) return { lower: 0, upper: 1, density: 0 }
  if (y <= 0) return { lower: 1, upper: 0, density: 0 }
  const n = a + b
  const logBinomial =
    stirlingError(n) - stirlingError(a) - stirlingError(b) - deviance(a, n * x) - deviance(b, n * y)
  const front = Math.exp(logBinomial) * Math.sqrt((a * b) / (2 * Math.PI * n))
  const density = front / (x * y)
  // so far out that the smaller tail is below the smallest number
  if (front === 0) return { lower: x < a / n ? 0 : 1, upper: x < a / n ? 1 : 0, density }
  if (x < (a + 1) / (n + 2)) {
    const lower = (front * fraction(x, a, b)) / a
    return { lower, upper: 1 - lower, density }
  }
  const upper = (front * fraction(y, b, a)) / b
  return { lower: 1 - upper, upper, density }
}

function fraction(x: number, a: number, b: number): number {
  let c = 1
  let d = 1 / nonZero(1 - ((a + b) * x) / (a + 1))
  let h = d
  for (let m = 1; m < 1_000_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
    d = 1 / nonZero(1 + even * d)
    c = nonZero(1 + even / c)
    h *= d * c
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1))
    d = 1 / nonZero(1 + odd * d)
    c = nonZero(1 + odd / c)
    const step = d * c
    h *= step
    if (Math.abs(step - 1) < 3e-16) return h
  }
  throw new StatisticsError('no-convergence', 'The beta distribution did not settle.')
}

function nonZero(value: number): number {
  return Math.abs(value) < TINY ? TINY : value
}
