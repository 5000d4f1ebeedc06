import { deviance } from './deviance.ts'
import { regularisedBeta } from './regularisedBeta.ts'
import { stirlingError } from './stirlingError.ts'

/**
 * P(X ≤ x) and P(X = x) for a binomial of n throws with probability ½, 0 ≤ x ≤ n, n ≥ 1.
 * Source: NIST DLMF 8.17.5; mass after Loader 2000.
 */
export function fairBinomial(x: number, n: number): { cdf: number; mass: number } {
  if (x === n) return { cdf: 1, mass: 2 ** -n }
  const cdf = regularisedBeta(0.5, 0.5, n - x, x + 1).lower
  if (x === 0) return { cdf, mass: 2 ** -n }
  const half = n / 2
  const log =
    stirlingError(n) -
    stirlingError(x) -
    stirlingError(n - x) -
    deviance(x, half) -
    deviance(n - x, half)
  return { cdf, mass: Math.exp(log) * Math.sqrt(n / (2 * Math.PI * x * (n - x))) }
}
