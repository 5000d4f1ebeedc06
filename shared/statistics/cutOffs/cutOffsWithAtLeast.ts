import type { RocCurve } from '../accuracy/rocCurve.ts'
import { requireProbability } from '../requireProbability.ts'
import { type CutOffPoint, cutOffPoint } from './cutOffPoint.ts'

export type ConstrainedCutOffs = {
  /** Of the tied cut-offs the one that is best in the constrained measure. */
  preferred: CutOffPoint
  /** All that tie in the other measure, strictest first. */
  cutOffs: CutOffPoint[]
}

/**
 * Among the cut-offs whose sensitivity (or specificity) is at least `least`, those with the largest
 * specificity (or sensitivity). The comparison is made in whole numbers, so that 81/90 counts as 0.9.
 * There is always one: everybody positive has sensitivity 1, nobody positive specificity 1.
 * @param least strictly between 0 and 1
 * @throws StatisticsError 'out-of-range'
 */
export function cutOffsWithAtLeast(
  curve: RocCurve,
  measure: 'sensitivity' | 'specificity',
  least: number,
): ConstrainedCutOffs {
  requireProbability(least, `The least ${measure}`)
  const { nPresent, nAbsent, truePositives, falsePositives } = curve
  const bySensitivity = measure === 'sensitivity'
  const size = bySensitivity ? nPresent : nAbsent
  // the smallest whole count that reaches the share; 1e-9 absorbs the rounding of the product
  const needed = Math.ceil(least * size - 1e-9)
  let best = -1
  let ties: number[] = []
  for (let k = 0; k < truePositives.length; k++) {
    const negatives = nAbsent - falsePositives[k]!
    const reached = bySensitivity ? truePositives[k]! : negatives
    if (reached < needed) continue
    const other = bySensitivity ? negatives : truePositives[k]!
    if (other > best) {
      best = other
      ties = [k]
    } else if (other === best) ties.push(k)
  }
  const cutOffs = ties.map((k) => cutOffPoint(curve, k))
  // sensitivity grows along the curve, specificity falls
  const preferred = bySensitivity ? cutOffs.at(-1)! : cutOffs[0]!
  return { preferred, cutOffs }
}
