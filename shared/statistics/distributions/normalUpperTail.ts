import { regularisedGamma } from './regularisedGamma.ts'

/**
 * P(Z > z) for a standard normal Z, with its digits kept far into the upper tail.
 * jStat computes 1 − erf there and loses them. Source: NIST DLMF 7.11.2.
 */
export function normalUpperTail(z: number): number {
  const { lower, upper } = regularisedGamma(0.5, (z * z) / 2)
  return z > 0 ? upper / 2 : 0.5 + lower / 2
}
