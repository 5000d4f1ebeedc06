import { normalTwoSided } from '../distributions/normalTwoSided.ts'
import type { NotDefined } from '../NotDefined.ts'
import { placementSums } from './placementSums.ts'
import type { RocCurve } from './rocCurve.ts'

export type MannWhitney = {
  /** Pairs in which the present exceed the absent on the raw scale, ties one half; and the reverse. */
  uPresent: number
  uAbsent: number
  /** Pairs ordered as the direction says. */
  uInDirection: number
  /** Two-sided, normal approximation with variance corrected for ties; null where all values tie. */
  p: number | null
  pContinuityCorrected: number | null
  notDefined: NotDefined | null
}

/**
 * The Mann–Whitney test that the two classes have one distribution.
 * Source: Mann & Whitney 1947, Ann Math Stat 18:50; ties Lehmann 1975.
 */
export function mannWhitney(curve: RocCurve): MannWhitney {
  const { nPresent: m, nAbsent: n, direction } = curve
  const uInDirection = placementSums(curve).concordantPairs
  const uPresent = direction === 'higher' ? uInDirection : m * n - uInDirection
  const us = { uPresent, uAbsent: m * n - uPresent, uInDirection }
  const total = m + n
  const variance = ((m * n) / 12) * (total + 1 - tieTerm(curve) / (total * (total - 1)))
  if (!(variance > 0)) {
    const sentence = 'All values are equal, so the classes cannot be told apart.'
    const notDefined: NotDefined = { code: 'zero-variance', sentence }
    return { ...us, p: null, pContinuityCorrected: null, notDefined }
  }
  const excess = Math.abs(uPresent - (m * n) / 2)
  const sd = Math.sqrt(variance)
  return {
    ...us,
    p: normalTwoSided(excess / sd),
    pContinuityCorrected: normalTwoSided(Math.max(0, excess - 0.5) / sd),
    notDefined: null,
  }
}

function tieTerm({ truePositives, falsePositives }: RocCurve): number {
  let sum = 0
  for (let k = 1; k < truePositives.length; k++) {
    const tied =
      truePositives[k]! + falsePositives[k]! - truePositives[k - 1]! - falsePositives[k - 1]!
    sum += tied * tied * tied - tied
  }
  return sum
}
