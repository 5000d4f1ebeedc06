/** A point of a ROC curve; the threshold is an observed value, or null beyond the last one. */
export interface RocCurvePoint {
  falsePositiveFraction: number
  sensitivity: number
  threshold: number | null
}

/** One biomarker's curve: points in order from (0, 0) to (1, 1). */
export interface RocCurveSeries {
  label: string
  /** Unit of the thresholds. */
  unit: string
  points: readonly RocCurvePoint[]
  /** Area under the curve with its 95 % interval; bounds are null where not estimable. */
  area?: { estimate: number; lower: number | null; upper: number | null }
  /** Pointwise confidence band of sensitivity. */
  band?: readonly { falsePositiveFraction: number; lower: number; upper: number }[]
}

export interface RocCutOff {
  falsePositiveFraction: number
  sensitivity: number
  value: number
  unit: string
  /** What kind of cut-off this is, such as "planned cut-off". */
  label: string
}
