import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Flag, Reading } from '../TraceResult.ts'

/**
 * AMBIENT warns where a reading lies at, below or little above room air: it is kept, since leaving such
 * readings out would throw out true negatives. Never for carbonyl sulfide, whose gradient may be
 * negative.
 */
export function ambientFlag(
  { analyte, meanPpb }: Reading,
  roomAirPpb: number | null,
  { ambientRatio, ambientExempt }: TraceSettings,
): Flag | null {
  if (meanPpb === null || roomAirPpb === null || ambientExempt.includes(analyte)) return null
  const isAtOrBelow = roomAirPpb >= meanPpb
  if (!isAtOrBelow && !(meanPpb < ambientRatio * roomAirPpb)) return null
  return {
    name: 'AMBIENT',
    cause: 'near-room-air',
    severity: 'warn',
    analyte,
    value: meanPpb,
    limit: isAtOrBelow ? roomAirPpb : ambientRatio * roomAirPpb,
    unit: 'ppb',
  }
}
