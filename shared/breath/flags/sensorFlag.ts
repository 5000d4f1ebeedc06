import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Flag } from '../TraceResult.ts'

/**
 * SENSOR: rejects where a zero, span or resonance check failed, warns where the last check is too old.
 * Not judged without a check in the settings.
 */
export function sensorFlag({
  sensorCheck,
  sensorCheckAgeH,
}: Pick<TraceSettings, 'sensorCheck' | 'sensorCheckAgeH'>): Flag | null {
  if (!sensorCheck) return null
  const { zeroPassed, spanPassed, resonancePassed, ageH } = sensorCheck
  const failed = [zeroPassed, spanPassed, resonancePassed].filter((passed) => passed === false)
  const flag = { name: 'SENSOR', analyte: null } as const
  if (failed.length > 0) {
    return {
      ...flag,
      cause: 'check-failed',
      severity: 'reject',
      value: failed.length,
      limit: 0,
      unit: 'checks',
    }
  }
  if (ageH === null || ageH <= sensorCheckAgeH) return null
  return {
    ...flag,
    cause: 'check-old',
    severity: 'warn',
    value: ageH,
    limit: sensorCheckAgeH,
    unit: 'h',
  }
}
