import { percentileOf } from '../ordering/percentileOf.ts'
import type { Clock } from './Clock.ts'

const FINEST = 1e9

/**
 * The clock of a trace: nanoseconds, or the finest power of ten that its latest instant still allows
 * in whole numbers (microseconds for seconds since 1970).
 * @param timeS n ≥ 2 strictly increasing instants
 * @param scratch at least n numbers, overwritten
 */
export function clockOf(timeS: Float64Array, scratch: Float64Array): Clock {
  const latest = Math.max(Math.abs(timeS[0]!), Math.abs(timeS[timeS.length - 1]!))
  const ticksPerSecond = Math.min(FINEST, 10 ** Math.floor(Math.log10(2 ** 52 / latest)))
  const ticks = (seconds: number) => Math.round(seconds * ticksPerSecond)
  const steps = timeS.length - 1
  for (let i = 0; i < steps; i++) scratch[i] = ticks(timeS[i + 1]!) - ticks(timeS[i]!)
  const intervalTicks = percentileOf(scratch, steps, 50)
  return { ticksPerSecond, intervalTicks, intervalS: intervalTicks / ticksPerSecond, ticks }
}
