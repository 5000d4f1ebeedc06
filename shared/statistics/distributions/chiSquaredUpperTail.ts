import { regularisedGamma } from './regularisedGamma.ts'

/** P(X > x) for chi-squared with `degreesOfFreedom` > 0. */
export function chiSquaredUpperTail(x: number, degreesOfFreedom: number): number {
  return regularisedGamma(degreesOfFreedom / 2, x / 2).upper
}
