import type { RocCurve } from '../accuracy/rocCurve.ts'
import type { TwoByTwo } from './twoByTwo.ts'

/** One point of a ROC curve as a cut-off. */
export type CutOffPoint = TwoByTwo & {
  /** Point number on the curve. */
  point: number
  /** Observed value, positive at or beyond it; null at the point where nobody is positive. */
  threshold: number | null
  /** Halfway to the neighbouring, laxer observed value; null at the curve's two ends. */
  midpoint: number | null
  sensitivity: number
  specificity: number
}

/** Point k of a curve with its threshold, counts, sensitivity and specificity. */
export function cutOffPoint(curve: RocCurve, k: number): CutOffPoint {
  const truePositives = curve.truePositives[k]!
  const falsePositives = curve.falsePositives[k]!
  const threshold = curve.thresholds[k]!
  const midpoint = curve.midpoints[k]!
  return {
    point: k,
    threshold: Number.isFinite(threshold) ? threshold : null,
    midpoint: Number.isFinite(midpoint) ? midpoint : null,
    truePositives,
    falsePositives,
    falseNegatives: curve.nPresent - truePositives,
    trueNegatives: curve.nAbsent - falsePositives,
    sensitivity: truePositives / curve.nPresent,
    specificity: (curve.nAbsent - falsePositives) / curve.nAbsent,
  }
}
