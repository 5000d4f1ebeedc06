import type { Breath } from './Breath.ts'
import type { Clock } from './Clock.ts'
import { lastAtOrBefore } from './lastAtOrBefore.ts'

/**
 * 1 for every sample outside all exhalations and farther than `distanceS` from each, else 0.
 * @param timeS strictly increasing instants
 */
export function roomAirMask(
  timeS: Float64Array,
  breaths: readonly Breath[],
  clock: Clock,
  distanceS: number,
): Uint8Array {
  const mask = new Uint8Array(timeS.length).fill(1)
  const distance = clock.ticks(distanceS)
  for (const { startS, endS } of breaths) {
    const from = lastAtOrBefore(timeS, clock, clock.ticks(startS) - distance - 1) + 1
    const to = lastAtOrBefore(timeS, clock, clock.ticks(endS) + distance) + 1
    mask.fill(0, from, to)
  }
  return mask
}
