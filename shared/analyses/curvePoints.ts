import type { StoredCurve } from '#shared/schemas/estimate.ts'

/** A stored curve as fractions; its last point calls everybody positive, so it holds both class sizes. */
export function curvePoints({ thresholds, truePositives, falsePositives }: StoredCurve) {
  const present = truePositives.at(-1) ?? 1
  const absent = falsePositives.at(-1) ?? 1
  return thresholds.map((threshold, at) => ({
    threshold,
    sensitivity: truePositives[at]! / present,
    falsePositiveFraction: falsePositives[at]! / absent,
  }))
}
