import type { NotDefined } from '../NotDefined.ts'

/** A ratio whose interval comes from its logarithm. Null where a zero cell leaves nothing to compute. */
export type RatioEstimate = {
  numerator: number | null
  denominator: number | null
  estimate: number | null
  lower: number | null
  upper: number | null
  standardErrorLog: number | null
  method: string
  notDefined: NotDefined | null
}

/**
 * numerator/denominator with the interval exp(ln ratio ∓ z·SE); `variance` is that of the logarithm
 * and not finite at a zero cell. A ratio of 0 is a value, one over 0 is unbounded, 0/0 is nothing.
 */
export function logRatio(ratio: {
  numerator: number | null
  denominator: number | null
  variance: number
  z: number
  method: string
}): RatioEstimate {
  const { numerator, denominator, variance, z, method } = ratio
  const bare = { numerator, denominator, method, standardErrorLog: null, lower: null, upper: null }
  if (numerator === null || denominator === null || (numerator === 0 && denominator === 0)) {
    const sentence = 'The ratio divides nothing by nothing, so it has no value.'
    return { ...bare, estimate: null, notDefined: { code: 'zero-denominator', sentence } }
  }
  if (denominator === 0) {
    const sentence = 'A cell of the table is empty: the ratio is larger than any number.'
    return { ...bare, estimate: null, notDefined: { code: 'unbounded', sentence } }
  }
  const estimate = numerator / denominator
  if (!Number.isFinite(variance)) {
    const sentence = 'A cell of the table is empty, so the log method gives no interval.'
    return { ...bare, estimate, notDefined: { code: 'zero-cell', sentence } }
  }
  const standardErrorLog = Math.sqrt(variance)
  return {
    numerator,
    denominator,
    method,
    estimate,
    standardErrorLog,
    lower: estimate * Math.exp(-z * standardErrorLog),
    upper: estimate * Math.exp(z * standardErrorLog),
    notDefined: null,
  }
}
