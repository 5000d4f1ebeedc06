/** Consecutive samples [from, to) of outward flow. */
export type FlowRun = {
  from: number
  to: number
  /** Σ flow · Δt, as measured. */
  volumeMl: number
  volumeBtpsMl: number | null
  meanFlowMlS: number
  /** First sample of the run after the dead space was blown out; `to` where it never was. */
  afterDeadSpace: number
}
