import type { SessionRule } from '#shared/terms/analysis.ts'

/**
 * One value for a subject with one or more sessions, in the unit of the values.
 * @param values in order of session, at least one; for `every` use them as they are
 */
export function oneValue(values: readonly number[], rule: Exclude<SessionRule, 'every'>): number {
  if (rule === 'first' || values.length === 1) return values[0]!
  if (rule === 'mean') return values.reduce((sum, value) => sum + value, 0) / values.length
  const rising = [...values].sort((a, b) => a - b)
  const middle = Math.floor(rising.length / 2)
  return rising.length % 2 === 1 ? rising[middle]! : (rising[middle - 1]! + rising[middle]!) / 2
}
