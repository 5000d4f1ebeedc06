import type { RocCurve } from '../accuracy/rocCurve.ts'
import { type CutOffPoint, cutOffPoint } from './cutOffPoint.ts'

/**
 * All cut-offs that tie for the smallest squared distance (1 − sensitivity)² + (1 − specificity)² to
 * the corner of a perfect test, strictest first. Never empty.
 * Source: Perkins & Schisterman 2006, Am J Epidemiol 163:670.
 */
export function closestToCornerCutOffs(curve: RocCurve): {
  squaredDistance: number
  cutOffs: CutOffPoint[]
} {
  const { nPresent, nAbsent, truePositives, falsePositives } = curve
  let best = Infinity
  let ties: number[] = []
  for (let k = 0; k < truePositives.length; k++) {
    // scaled to whole numbers, exact while (present × absent)² stays below 2⁵³
    const missed = (nPresent - truePositives[k]!) * nAbsent
    const falseAlarms = falsePositives[k]! * nPresent
    const scaled = missed * missed + falseAlarms * falseAlarms
    if (scaled < best) {
      best = scaled
      ties = [k]
    } else if (scaled === best) ties.push(k)
  }
  return {
    squaredDistance: best / (nPresent * nAbsent) ** 2,
    cutOffs: ties.map((k) => cutOffPoint(curve, k)),
  }
}
