import type { Clock } from './Clock.ts'

/** Index of the last sample at or before an instant in ticks; −1 where all lie after it. */
export function lastAtOrBefore(timeS: Float64Array, clock: Clock, instantTicks: number): number {
  let low = -1
  let high = timeS.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (clock.ticks(timeS[middle]!) <= instantTicks) low = middle
    else high = middle
  }
  return low
}
