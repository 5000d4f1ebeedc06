import { chiSquaredQuantile } from '../distributions/chiSquaredQuantile.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval } from '../Interval.ts'

/** One part of a total variance: its estimate (with its factor) and its degrees of freedom. */
export type VariancePart = { variance: number; df: number }

export type MoverLimits = {
  sd: number
  lower: number
  upper: number
  lowerInterval: Interval
  upperInterval: Interval
}

/**
 * Limits bias ∓ z·SD with intervals that recover the variance estimates (MOVER): the interval of a sum
 * of variances from those of its parts, then of the limit from those of bias and SD.
 * @param biasVariance variance of the bias, whose interval is bias ∓ z·SE
 * Source: Zou 2013, Stat Methods Med Res 22:630.
 */
export function moverLimits(
  given: { bias: number; biasVariance: number; parts: VariancePart[] },
  { level, coverage }: { level: number; coverage: number },
): MoverLimits {
  const { bias, biasVariance, parts } = given
  const z = zFor(coverage)
  const tail = (1 - level) / 2
  let total = 0
  let below = 0
  let above = 0
  for (const { variance, df } of parts) {
    if (df === 0) continue
    total += variance
    below += (variance * (1 - df / chiSquaredQuantile(1 - tail, df))) ** 2
    above += (variance * (df / chiSquaredQuantile(tail, df) - 1)) ** 2
  }
  const sd = Math.sqrt(total)
  const sdLower = Math.sqrt(Math.max(0, total - Math.sqrt(below)))
  const sdUpper = Math.sqrt(total + Math.sqrt(above))
  const biasHalf = zFor(level) * Math.sqrt(biasVariance)
  const inner = Math.hypot(biasHalf, z * (sd - sdLower))
  const outer = Math.hypot(biasHalf, z * (sdUpper - sd))
  const lower = bias - z * sd
  const upper = bias + z * sd
  return {
    sd,
    lower,
    upper,
    lowerInterval: { lower: lower - outer, upper: lower + inner },
    upperInterval: { lower: upper - inner, upper: upper + outer },
  }
}
