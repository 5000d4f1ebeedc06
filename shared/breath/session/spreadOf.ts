import { finiteOrNull } from '../ordering/finiteOrNull.ts'

/** Standard deviation (n − 1) of values and its percentage of their mean; null below two values. */
export function spreadOf(values: readonly number[]): {
  sd: number | null
  cvPercent: number | null
} {
  const n = values.length
  if (n < 2) return { sd: null, cvPercent: null }
  const mean = values.reduce((sum, value) => sum + value, 0) / n
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  const sd = finiteOrNull(Math.sqrt(squares / (n - 1)))
  return { sd, cvPercent: sd === null ? null : finiteOrNull((100 * sd) / Math.abs(mean)) }
}
