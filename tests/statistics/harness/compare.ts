import type { Json, Tolerance } from './ReferenceRecord.ts'

/** Stands where the record's note says that a number is not the one to compare. */
export const NOT_COMPARED = Symbol('not compared')

/** What the product's function said, in the record's shape; null = it has no value there. */
export type Actual =
  | null
  | number
  | string
  | boolean
  | typeof NOT_COMPARED
  | Actual[]
  | { [key: string]: Actual }

/** Numbers that are undefined together: a statistic with its p, an interval's two ends. */
const TOGETHER = [
  ['lower', 'upper'],
  ['wald_lower', 'wald_upper'],
  ['z', 'p'],
  ['bias_t', 'bias_p'],
  ['slope_t', 'slope_p'],
]

/**
 * Every disagreement between a record's value and the product's, as sentences; none = it agrees.
 * Where a library printed an infinity (or one end of an interval that has no other end), the product's
 * answer is "no value, because …": null agrees with null, Infinity and −Infinity, with a group of
 * numbers that belong together of which one is not finite, and with an interval over the whole range.
 */
export function compare(expected: Json, actual: Actual, tolerance: Tolerance, path = ''): string[] {
  if (actual === NOT_COMPARED) return []
  if (typeof expected === 'number') return compareNumber(expected, actual, tolerance, path)
  if (expected === null || expected === 'Infinity' || expected === '-Infinity') {
    const same = hasNoValue(actual) || String(actual) === String(expected)
    return same ? [] : [`${path}: expected ${expected}, got ${show(actual)}`]
  }
  if (typeof expected === 'string' || typeof expected === 'boolean') {
    return expected === actual ? [] : [`${path}: expected ${expected}, got ${show(actual)}`]
  }
  if (actual === null && isUndefinedThroughout(expected)) return []
  return Array.isArray(expected)
    ? compareList(expected, actual, tolerance, path)
    : compareObject(expected, actual, tolerance, path)
}

function compareNumber(
  expected: number,
  actual: Actual,
  tolerance: Tolerance,
  path: string,
): string[] {
  const allowed =
    tolerance.type === 'absolute'
      ? tolerance.size
      : tolerance.size * Math.abs(expected) + (tolerance.floor ?? 0)
  if (typeof actual === 'number' && Math.abs(actual - expected) <= allowed) return []
  return [`${path}: expected ${expected}, got ${show(actual)} (allowed ±${allowed})`]
}

function compareList(
  expected: Json[],
  actual: Actual,
  tolerance: Tolerance,
  path: string,
): string[] {
  if (!Array.isArray(actual)) return [`${path}: expected a list, got ${show(actual)}`]
  if (actual.length !== expected.length) {
    return [`${path}: expected ${expected.length} entries, got ${actual.length}`]
  }
  return expected.flatMap((entry, i) => compare(entry, actual[i]!, tolerance, `${path}[${i}]`))
}

function compareObject(
  expected: { [key: string]: Json },
  actual: Actual,
  tolerance: Tolerance,
  path: string,
): string[] {
  if (actual === null || typeof actual !== 'object' || Array.isArray(actual)) {
    return [`${path}: expected an object, got ${show(actual)}`]
  }
  const excused = new Set<string>()
  for (const group of TOGETHER) {
    const inGroup = group.filter((key) => key in expected)
    const none = inGroup.length > 0 && inGroup.every((key) => actual[key] === null)
    if (none && saysNothing(inGroup.map((key) => expected[key]!))) {
      for (const key of inGroup) excused.add(key)
    }
  }
  return Object.entries(expected).flatMap(([key, value]) => {
    if (excused.has(key)) return []
    const where = path === '' ? key : `${path}.${key}`
    if (!(key in actual)) return [`${where}: the product has no such number`]
    return compare(value, actual[key]!, tolerance, where)
  })
}

/** One of the numbers is not finite, or they are an interval over the whole range (0…1 or −1…1). */
function saysNothing(values: Json[]): boolean {
  if (values.some((value) => typeof value !== 'number')) return true
  const [lower, upper] = values
  return values.length === 2 && upper === 1 && (lower === 0 || lower === -1)
}

/** No finite number anywhere, or an interval that says nothing. */
function isUndefinedThroughout(value: Json): boolean {
  if (value === null || value === 'Infinity' || value === '-Infinity') return true
  if (typeof value !== 'object') return false
  if (Array.isArray(value)) return value.every(isUndefinedThroughout)
  const isInterval = 'lower' in value && 'upper' in value && Object.keys(value).length === 2
  const members = Object.values(value)
  return isInterval ? saysNothing(members) : members.every(isUndefinedThroughout)
}

/** null, or an object of nulls only (an interval without ends). */
function hasNoValue(actual: Actual): boolean {
  if (actual === null) return true
  return typeof actual === 'object' && Object.values(actual).every(hasNoValue)
}

function show(actual: Actual): string {
  return typeof actual === 'object' && actual !== null ? JSON.stringify(actual) : String(actual)
}
