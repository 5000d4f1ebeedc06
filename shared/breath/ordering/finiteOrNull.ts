/** The number, or null where it is none: a result never carries NaN or Infinity. */
export function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null
}
