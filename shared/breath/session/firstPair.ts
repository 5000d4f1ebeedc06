import type { TraceSettings } from '../settings/TraceSettings.ts'
import { agree } from './agree.ts'

/**
 * Positions of the first reproducible pair: the earliest later reading that agrees with any earlier
 * one, and the earliest such earlier one. Null where none agree.
 */
export function firstPair(
  analyte: string,
  readings: readonly { meanPpb: number; censored: boolean }[],
  settings: TraceSettings,
): [number, number] | null {
  for (let later = 1; later < readings.length; later++) {
    for (let earlier = 0; earlier < later; earlier++) {
      if (agree(analyte, readings[earlier]!, readings[later]!, settings)) return [earlier, later]
    }
  }
  return null
}
