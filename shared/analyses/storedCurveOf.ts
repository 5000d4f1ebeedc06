import type { StoredCurve } from '#shared/schemas/estimate.ts'
import type { RocCurve } from '#shared/statistics/accuracy/rocCurve.ts'

/** A curve as it is stored: no number in it is infinite. */
export const storedCurveOf = (curve: RocCurve): StoredCurve => ({
  thresholds: Array.from(curve.thresholds, (each) => (Number.isFinite(each) ? each : null)),
  truePositives: [...curve.truePositives],
  falsePositives: [...curve.falsePositives],
})
