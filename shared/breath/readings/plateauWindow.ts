import type { Breath } from '../breaths/Breath.ts'
import type { Trace } from './Trace.ts'

/** Samples [from, to) of the plateau and the window's edges. */
export type Samples = { from: number; to: number; startS: number; endS: number }

/**
 * The last 3 s of an exhalation (a setting): samples with end − 3 ≤ t < end, where `end` is one step
 * after its last sample at or above 50 % CO2. Null where the exhalation does not fill the window.
 */
export function plateauWindow({ columns, clock, settings }: Trace, breath: Breath): Samples | null {
  const { timeS } = columns
  const end = clock.ticks(timeS[breath.last]!) + clock.intervalTicks
  const start = end - clock.ticks(settings.windowS)
  if (clock.ticks(timeS[breath.first]!) > start) return null
  let from = breath.last
  while (from > breath.first && clock.ticks(timeS[from - 1]!) >= start) from--
  return {
    from,
    to: breath.last + 1,
    startS: start / clock.ticksPerSecond,
    endS: end / clock.ticksPerSecond,
  }
}
