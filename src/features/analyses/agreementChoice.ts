import type { AgreementParameters } from '#shared/schemas/agreement.ts'

/** What an analyst chooses about an agreement beyond analyte and sessions. */
export type AgreementChoice = Pick<
  AgreementParameters,
  'scale' | 'trueValue' | 'spread' | 'errorVarianceRatio' | 'decisionLevels'
> & {
  /** Acceptance limits, each blank until it is typed. */
  lower: number | null
  upper: number | null
}

/** What stands before anything is chosen, with the protocol's acceptance limits. */
export const firstChoice = (
  planned: { lower: number; upper: number } | undefined,
): AgreementChoice => ({
  scale: 'difference',
  trueValue: 'varying',
  spread: 'changing',
  errorVarianceRatio: 1,
  decisionLevels: [],
  lower: planned?.lower ?? null,
  upper: planned?.upper ?? null,
})
