import type { AgreementScale } from '#shared/terms/agreementTerms.ts'

/** How far a pair lies apart on a scale: in its unit, as a ratio, or in percent of the pair's mean. */
export function plottedDifference(
  scale: AgreementScale,
  sensor: number,
  reference: number,
): number {
  if (scale === 'ratio') return sensor / reference
  if (scale === 'percent') return (200 * (sensor - reference)) / (sensor + reference)
  return sensor - reference
}
