import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Adjusted } from '../TraceResult.ts'

/** Shared by all that are not there: a long trace has many. */
const NOT_ASKED: Adjusted = Object.freeze({ ppb: null, why: 'not-asked' })
const NEVER: Adjusted = Object.freeze({ ppb: null, why: 'never-for-this-gas' })
const NOT_COMPUTABLE: Adjusted = Object.freeze({ ppb: null, why: 'not-computable' })

/**
 * A value that the protocol asks for by naming the gas; refused for a gas for which the field says
 * never, whatever the protocol asks.
 * @param compute null or not finite where something it needs is missing
 */
export function adjustedIf(
  asked: readonly string[],
  analyte: string,
  { neverNormalise }: Pick<TraceSettings, 'neverNormalise'>,
  compute: () => number | null,
): Adjusted {
  if (!asked.includes(analyte)) return NOT_ASKED
  if (neverNormalise.includes(analyte)) return NEVER
  const ppb = compute()
  return ppb !== null && Number.isFinite(ppb) ? { ppb, why: null } : NOT_COMPUTABLE
}
