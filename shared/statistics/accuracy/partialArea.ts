import type { NotDefined } from '../NotDefined.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { RocCurve } from './rocCurve.ts'

export type PartialArea = {
  /** Area under the curve over the range of 1 − specificity. */
  raw: number
  /** McClish's correction: 0.5 = chance, 1 = perfect; null where the raw area is below chance. */
  corrected: number | null
  notDefined: NotDefined | null
}

/**
 * Area under the part of the curve between two specificities, by trapezoids with the curve cut
 * straight at the ends, and standardised.
 * @param range specificities, 0 ≤ from < to ≤ 1
 * @throws StatisticsError 'out-of-range'
 * Source: McClish 1989, Med Decis Making 9:190.
 */
export function partialArea(curve: RocCurve, range: { from: number; to: number }): PartialArea {
  const { from, to } = range
  if (!(from >= 0 && from < to && to <= 1)) {
    throw new StatisticsError('out-of-range', 'The specificities must satisfy 0 ≤ from < to ≤ 1.')
  }
  const left = 1 - to
  const right = 1 - from
  const { truePositives, falsePositives, nPresent, nAbsent } = curve
  let raw = 0
  for (let k = 1; k < truePositives.length; k++) {
    const x0 = falsePositives[k - 1]! / nAbsent
    const x1 = falsePositives[k]! / nAbsent
    const start = Math.max(x0, left)
    const end = Math.min(x1, right)
    if (end <= start) continue
    const y0 = truePositives[k - 1]! / nPresent
    const slope = (truePositives[k]! / nPresent - y0) / (x1 - x0)
    raw += (end - start) * (y0 + slope * ((start + end) / 2 - x0))
  }
  const chance = (right * right - left * left) / 2
  const perfect = right - left
  // on the chance line itself rounding must not turn 0.5 into "below"
  if (raw < chance - 1e-12) {
    const sentence = 'The curve lies under the chance line there, so the correction does not apply.'
    return { raw, corrected: null, notDefined: { code: 'below-chance', sentence } }
  }
  return { raw, corrected: (1 + (raw - chance) / (perfect - chance)) / 2, notDefined: null }
}
