import type { Breath } from '../breaths/Breath.ts'
import type { FlowRun } from '../breaths/FlowRun.ts'
import type { Trace } from './Trace.ts'

/**
 * Length of phase III in s: samples of the exhalation after the dead space was blown out (where flow is
 * recorded) with CO2 at or above 80 % of end-tidal, each lasting one median step. Samples within
 * `valveArtefactS` of the exhalation's end are left out where the protocol says so.
 */
export function phaseThreeS(
  { columns, clock, settings }: Trace,
  breath: Breath,
  run: FlowRun | null,
): number {
  const level = (breath.co2MaximumPercent * settings.phaseThreePercent) / 100
  const from = Math.max(breath.first, run?.afterDeadSpace ?? 0)
  const end =
    clock.ticks(columns.timeS[breath.last]!) +
    clock.intervalTicks -
    clock.ticks(settings.valveArtefactS)
  let count = 0
  for (let i = from; i <= breath.last && clock.ticks(columns.timeS[i]!) < end; i++) {
    if (columns.co2Percent[i]! >= level) count++
  }
  return (count * clock.intervalTicks) / clock.ticksPerSecond
}
