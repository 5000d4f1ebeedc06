import type { AccuracyAtCutOffResult, AccuracyOverall } from '#shared/schemas/analysis.ts'
import type { Direction } from '#shared/terms/protocol.ts'

/** What the panels of an accuracy analysis draw, stored or explored. */
export type AccuracyShown = {
  analyteName: string
  /** As a person reads it. */
  unit: string
  direction: Direction
  confidence: number
  prevalence: number | null
  plannedCutOff: number | null
  overall: AccuracyOverall
  atCutOff: AccuracyAtCutOffResult | null
}
