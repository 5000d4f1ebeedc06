import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Flag, Reading } from '../TraceResult.ts'

/** PLATEAU_SLOPE on the absolute change over the window; rejects the gases that the protocol names. */
export function slopeFlag(
  { analyte, changePercent }: Reading,
  { slopePercent, slopeRejects }: TraceSettings,
): Flag | null {
  if (changePercent === null || Math.abs(changePercent) <= slopePercent) return null
  return {
    name: 'PLATEAU_SLOPE',
    cause: 'plateau-slope',
    severity: slopeRejects.includes(analyte) ? 'reject' : 'warn',
    analyte,
    value: Math.abs(changePercent),
    limit: slopePercent,
    unit: '%',
  }
}
