import { defaultSettings } from './defaultSettings.ts'
import type { TraceSettings } from './TraceSettings.ts'

/** The only settings that may lie below nought. */
const MAY_BE_NEGATIVE = ['lowestCo2Percent', 'transportDelayS', 'roomAirPpb']

/**
 * The protocol's settings over the defaults.
 * @throws RangeError where a number is not finite, is negative, or the window or coverage is nought:
 * that is a mistake in the protocol, not in a trace
 */
export function completeSettings(settings: Partial<TraceSettings> = {}): TraceSettings {
  const given = Object.fromEntries(
    Object.entries(settings).filter(([, value]) => value !== undefined),
  )
  const complete: TraceSettings = { ...defaultSettings, ...given }
  requireSound(complete)
  for (const analyte of Object.values(complete.analytes)) requireSound(analyte)
  for (const name of ['windowS', 'coverage', 'lagRejectDivisor', 'lagWarnDivisor'] as const) {
    if (!(complete[name] > 0)) throw new RangeError(`The setting ${name} must be above nought.`)
  }
  return complete
}

function requireSound(settings: object): void {
  for (const [name, value] of Object.entries(settings)) {
    if (typeof value !== 'number') continue
    if (!Number.isFinite(value) || (value < 0 && !MAY_BE_NEGATIVE.includes(name))) {
      throw new RangeError(`The setting ${name} must be a number, nought or more.`)
    }
  }
}
