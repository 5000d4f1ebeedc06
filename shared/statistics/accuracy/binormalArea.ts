import { moments } from '../description/moments.ts'
import { normalCdf } from '../distributions/normalCdf.ts'
import type { NotDefined } from '../NotDefined.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Classes } from './Classes.ts'

export type BinormalArea = {
  raw: number | null
  /** On natural logarithms; null where a value is not above 0. */
  log: number | null
  notDefined: NotDefined | null
}

/**
 * The area that two normal distributions with the classes' means and variances would have:
 * Φ((mean present − mean absent)/√(variance present + variance absent)), sign by direction.
 * @param classes at least two values in each class
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: Faraggi & Reiser 2002, Stat Med 21:3093.
 */
export function binormalArea({ present, absent, direction }: Classes): BinormalArea {
  if (present.length < 2 || absent.length < 2) {
    throw new StatisticsError('too-few', 'Each class needs at least two values for its variance.')
  }
  requireFinite(present, 'Values with the condition present')
  requireFinite(absent, 'Values with the condition absent')
  const sign = direction === 'higher' ? 1 : -1
  const areaOf = (a: ArrayLike<number>, b: ArrayLike<number>): number | null => {
    const one = moments(a)
    const two = moments(b)
    const variance = one.sd * one.sd + two.sd * two.sd
    const gap = sign * (one.mean - two.mean)
    if (variance > 0) return normalCdf(gap / Math.sqrt(variance))
    // two constant classes are told apart with certainty, unless they are the same constant
    if (gap === 0) return null
    return gap > 0 ? 1 : 0
  }
  const raw = areaOf(present, absent)
  const positive = allPositive(present) && allPositive(absent)
  const log = positive
    ? areaOf(
        Float64Array.from(present, (v) => Math.log(v)),
        Float64Array.from(absent, (v) => Math.log(v)),
      )
    : null
  return { raw, log, notDefined: reason(raw, positive) }
}

function allPositive(values: ArrayLike<number>): boolean {
  for (let i = 0; i < values.length; i++) if (values[i]! <= 0) return false
  return true
}

function reason(raw: number | null, positive: boolean): NotDefined | null {
  if (raw === null) {
    return { code: 'zero-variance', sentence: 'Neither class varies, so no normal curve fits.' }
  }
  if (positive) return null
  return { code: 'not-positive', sentence: 'Values at or below 0 have no logarithm.' }
}
