import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'
import type { Breath } from './Breath.ts'
import { breathsOfStretch } from './breathsOfStretch.ts'
import type { Clock } from './Clock.ts'
import { forEachStretch } from './forEachStretch.ts'

/**
 * The exhalations of a trace, in their order. A breath starts and ends where CO2 crosses 50 % of its
 * own maximum and is over once CO2 falls below 30 % of it; its end is then its last crossing of 50 %.
 * Listed are those that reach 1 % CO2, last 1 s and, where flow is recorded, flow outwards for at
 * least half of their samples; the limits are settings.
 */
export function detectBreaths(
  columns: TraceColumns,
  clock: Clock,
  settings: TraceSettings,
): Breath[] {
  const { timeS, co2Percent, flowMlS } = columns
  const gapTicks = clock.ticks(settings.gapS)
  const shortest = clock.ticks(settings.breathS)
  const isListed = ({ first, last, startS, endS, co2MaximumPercent }: Breath) =>
    co2MaximumPercent >= settings.breathCo2Percent &&
    clock.ticks(endS - startS) >= shortest &&
    (!flowMlS || positivePercent(flowMlS, first, last) >= settings.breathFlowPercent)

  /** The instant between samples i and i + 1 where CO2 passes `level`; `otherwise` across a gap. */
  const crossing = (i: number, level: number, otherwise: number) => {
    const [from, to] = [timeS[i]!, timeS[i + 1]!]
    if (clock.ticks(to) - clock.ticks(from) > gapTicks) return otherwise
    return from + ((to - from) * (level - co2Percent[i]!)) / (co2Percent[i + 1]! - co2Percent[i]!)
  }

  const breaths: Breath[] = []
  forEachStretch(co2Percent, settings, (stretch) => {
    for (const found of breathsOfStretch(co2Percent, stretch, settings)) {
      const { first, last, level, cutStart, cutEnd } = found
      const breath: Breath = {
        first,
        last,
        startS: cutStart || first === 0 ? timeS[first]! : crossing(first - 1, level, timeS[first]!),
        endS: last + 1 === timeS.length ? timeS[last]! : crossing(last, level, timeS[last]!),
        co2MaximumPercent: found.maximum,
        cutOff: cutStart || cutEnd,
      }
      if (isListed(breath)) breaths.push(breath)
    }
  })
  return breaths
}

function positivePercent(flow: Float64Array, first: number, last: number): number {
  let positive = 0
  for (let i = first; i <= last; i++) if (flow[i]! > 0) positive++
  return (100 * positive) / (last - first + 1)
}
