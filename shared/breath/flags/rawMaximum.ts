import { lastAtOrBefore } from '../breaths/lastAtOrBefore.ts'
import type { Samples } from '../readings/plateauWindow.ts'
import type { Trace, TraceGas } from '../readings/Trace.ts'

/**
 * The largest value as recorded among those that the window's aligned samples stand on. A saturated
 * sample counts even where interpolation has pulled it below the limit.
 */
export function rawMaximum({ columns, clock }: Trace, gas: TraceGas, samples: Samples): number {
  const { timeS } = columns
  const arrival = (i: number) => clock.ticks(timeS[i]!) + gas.delayTicks
  const from = Math.max(lastAtOrBefore(timeS, clock, arrival(samples.from)), 0)
  const wanted = arrival(samples.to - 1)
  let to = Math.max(lastAtOrBefore(timeS, clock, wanted), 0)
  if (clock.ticks(timeS[to]!) < wanted && to < timeS.length - 1) to++
  let highest = gas.rawPpb[from]!
  for (let i = from + 1; i <= to; i++) highest = Math.max(highest, gas.rawPpb[i]!)
  return highest
}
