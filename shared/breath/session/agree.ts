import { percentOfMean } from '../conversions/percentOfMean.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'

/** Percentages and differences of decimals that lie on their limit agree. */
const ROUNDING = 1e-9

type Value = { meanPpb: number; censored: boolean }

/**
 * Whether two readings of a gas agree: within 10 % of the pair's mean; nitric oxide with either value
 * below 30 ppb within 2 ppb; two readings below the limit of detection always (limits are settings).
 * Source: the absolute rule and the rule below detection follow the NHANES 2007–08 procedure for
 * exhaled nitric oxide, the 10 % ATS/ERS 2005 (from memory).
 */
export function agree(
  analyte: string,
  a: Value,
  b: Value,
  settings: Pick<TraceSettings, 'agreePercent' | 'agreePpbGases' | 'agreePpb' | 'agreePpbBelow'>,
): boolean {
  if (a.censored && b.censored) return true
  const isLow = Math.min(a.meanPpb, b.meanPpb) < settings.agreePpbBelow
  if (settings.agreePpbGases.includes(analyte) && isLow) {
    return Math.abs(a.meanPpb - b.meanPpb) <= settings.agreePpb + ROUNDING
  }
  return percentOfMean(a.meanPpb, b.meanPpb) <= settings.agreePercent + ROUNDING
}
