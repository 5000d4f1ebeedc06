/** An axis of a curve of a plan. */
export interface PlanCurveAxis {
  label: string
  unit?: string
  kind: 'linear' | 'log'
  /** How its numbers are written in the table. */
  format: 'count' | 'proportion' | 'concentration'
}

export interface PlanCurveLine {
  label: string
  /** In order of x; y is null where there is no answer, and the line is broken there. */
  points: readonly { x: number; y: number | null }[]
}

/** How the answer of a plan moves with the assumption that it depends on most: one to four lines. */
export interface PlanCurveData {
  title: string
  x: PlanCurveAxis
  y: PlanCurveAxis
  lines: readonly PlanCurveLine[]
  /** The plan itself. */
  mark?: { x: number; y: number; label: string }
}
