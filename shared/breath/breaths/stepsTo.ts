import type { Clock } from './Clock.ts'

/**
 * How long sample i stands for in sums: the time to the next sample. Across a gap, of which nothing
 * is known, and after the last sample it stands for the median step.
 */
export function stepsTo(timeS: Float64Array, clock: Clock, gapS: number): (i: number) => number {
  const gap = clock.ticks(gapS)
  return (i) => {
    if (i + 1 >= timeS.length) return clock.intervalS
    const step = clock.ticks(timeS[i + 1]!) - clock.ticks(timeS[i]!)
    return (step > gap ? clock.intervalTicks : step) / clock.ticksPerSecond
  }
}
