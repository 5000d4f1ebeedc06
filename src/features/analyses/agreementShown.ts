import type { AgreementFigures } from '#shared/schemas/analysis.ts'
import { formatEstimate, formatInterval } from '#shared/terms/numbers.ts'

/** What the panels of an agreement analysis draw, stored or explored. */
export type AgreementShown = {
  analyteName: string
  /** As a person reads it. */
  unit: string
  confidence: number
  figures: AgreementFigures
  pairs: { sensor: readonly number[]; reference: readonly number[]; subjects: readonly string[] }
}

/** So many decimals that the SD of the differences shows four digits. */
export function agreementDecimals(sd: number): number {
  if (sd === 0) return 3
  return Math.min(8, Math.max(0, 3 - Math.floor(Math.log10(sd))))
}

type Line = { estimate: number; lower: number; upper: number }

/** "−2.1" and "−22.0 to 17.8" of a line, in the decimals that its spread deserves. */
export function lineWords({ estimate, lower, upper }: Line, sd: number): [string, string] {
  const decimals = agreementDecimals(sd)
  return [formatEstimate(estimate, decimals), formatInterval(lower, upper, decimals)]
}
