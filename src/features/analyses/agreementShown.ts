import type { AgreementPairs } from '#shared/analyses/agreementPairs.ts'
import type { AgreementFigures } from '#shared/schemas/agreement.ts'

/** What the panels of an agreement analysis draw, stored or explored. */
export type AgreementShown = {
  analyteName: string
  /** As a person reads it. */
  unit: string
  confidence: number
  errorVarianceRatio: number
  figures: AgreementFigures
  pairs: Omit<AgreementPairs, 'counts'>
}
