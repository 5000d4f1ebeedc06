import type { Clock } from '../breaths/Clock.ts'

/** The longest step in s between neighbouring samples from…to; both are kept inside the record. */
export function largestStepS(timeS: Float64Array, clock: Clock, from: number, to: number): number {
  const last = Math.min(to, timeS.length - 1)
  let longest = 0
  for (let i = Math.max(from, 0); i < last; i++) {
    longest = Math.max(longest, clock.ticks(timeS[i + 1]!) - clock.ticks(timeS[i]!))
  }
  return longest / clock.ticksPerSecond
}
