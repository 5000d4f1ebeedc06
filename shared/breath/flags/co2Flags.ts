import type { Flag } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'

/**
 * CO2_LOW and CO2_HIGH on end-tidal CO2 warn and never reject: rejecting would select on disease.
 * REBREATHE on inspired CO2 warns or rejects.
 */
export function co2Flags({ trace, breath }: JudgedExhalation): Flag[] {
  const { settings, inspiredCo2Percent: inspired } = trace
  const endTidal = breath.co2MaximumPercent
  const base = { analyte: null, unit: '%' } as const
  const flags: Flag[] = []
  for (const limit of [settings.co2VeryLowPercent, settings.co2LowPercent]) {
    if (endTidal < limit && flags.length === 0) {
      const flag = { name: 'CO2_LOW', cause: 'co2-low', severity: 'warn' } as const
      flags.push({ ...base, ...flag, value: endTidal, limit })
    }
  }
  if (endTidal > settings.co2HighPercent) {
    const flag = { name: 'CO2_HIGH', cause: 'co2-high', severity: 'warn' } as const
    flags.push({ ...base, ...flag, value: endTidal, limit: settings.co2HighPercent })
  }
  if (inspired > settings.rebreatheWarnPercent) {
    const rejects = inspired > settings.rebreatheRejectPercent
    flags.push({
      ...base,
      name: 'REBREATHE',
      cause: 'inspired-co2',
      severity: rejects ? 'reject' : 'warn',
      value: inspired,
      limit: rejects ? settings.rebreatheRejectPercent : settings.rebreatheWarnPercent,
    })
  }
  return flags
}
