import type { AgreementFigures } from '#shared/schemas/analysis.ts'

/** What the panels of an agreement analysis draw, stored or explored. */
export type AgreementShown = {
  analyteName: string
  /** As a person reads it. */
  unit: string
  confidence: number
  figures: AgreementFigures
  pairs: { sensor: readonly number[]; reference: readonly number[]; subjects: readonly string[] }
}
