import { unitLabel } from '#shared/terms/gases.ts'

/** An analyte that a protocol may speak of. */
export type AnalyteOption = { key: string; name: string; unit: string | undefined }

export const optionsOf = (analytes: readonly AnalyteOption[]) =>
  analytes.map(({ key, name }) => ({ value: key, label: name }))

/** The unit as it stands beside a box; nothing while none is chosen. */
export function unitOf(analytes: readonly AnalyteOption[], key: unknown): string | undefined {
  const unit = analytes.find((analyte) => analyte.key === key)?.unit
  return unit ? unitLabel(unit) || undefined : undefined
}
