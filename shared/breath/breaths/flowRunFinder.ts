import { btpsFactor } from '../conversions/btpsFactor.ts'
import { saturationPressureKpa } from '../conversions/saturationPressureKpa.ts'
import { finiteOrNull } from '../ordering/finiteOrNull.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'
import type { Clock } from './Clock.ts'
import type { FlowRun } from './FlowRun.ts'
import { stepsTo } from './stepsTo.ts'

/**
 * Finds the run of outward flow that holds most of the samples first…last; null where flow is not
 * recorded or never outwards there. Asked in the order of the trace, each run is looked at once.
 */
export function flowRunFinder(
  columns: TraceColumns,
  clock: Clock,
  settings: TraceSettings,
): (first: number, last: number) => FlowRun | null {
  const { flowMlS } = columns
  if (!flowMlS) return () => null
  const stepS = stepsTo(columns.timeS, clock, settings.gapS)
  let latest: FlowRun | null = null

  const runAt = (i: number): FlowRun => {
    if (latest && latest.from <= i && i < latest.to) return latest
    let from = i
    while (from > 0 && flowMlS[from - 1]! > 0) from--
    let to = i + 1
    while (to < flowMlS.length && flowMlS[to]! > 0) to++
    return runOf(columns, flowMlS, from, to, stepS, settings)
  }

  return (first, last) => {
    let best: FlowRun | null = null
    let most = 0
    for (let i = first; i <= last; i++) {
      if (!(flowMlS[i]! > 0)) continue
      const run = runAt(i)
      latest = run
      const held = Math.min(run.to, last + 1) - i
      if (held > most) {
        best = run
        most = held
      }
      i = run.to
    }
    return best
  }
}

function runOf(
  columns: TraceColumns,
  flow: Float64Array,
  from: number,
  to: number,
  stepS: (i: number) => number,
  settings: TraceSettings,
): FlowRun {
  const deadSpaceMl =
    settings.subject === 'child' ? settings.deadSpaceChildMl : settings.deadSpaceMl
  // Sums of decimal steps fall short of their decimal total by a few units in the last place.
  const enough = deadSpaceMl * (1 - 1e-12)
  let volumeMl = 0
  let sum = 0
  let afterDeadSpace = to
  for (let i = from; i < to; i++) {
    if (afterDeadSpace === to && volumeMl >= enough) afterDeadSpace = i
    volumeMl += flow[i]! * stepS(i)
    sum += flow[i]!
  }
  const factor = factorOf(columns, from, to, settings.barometricPressureKpa)
  return {
    from,
    to,
    volumeMl,
    volumeBtpsMl: factor === null ? null : finiteOrNull(volumeMl * factor),
    meanFlowMlS: sum / (to - from),
    afterDeadSpace,
  }
}

/** The saturation pressure's formula holds between these (WMO-No. 8, from memory). */
const COLDEST_C = -45
const WARMEST_C = 60

/**
 * From the run's mean temperature and humidity; saturated where humidity is not recorded. Null where
 * temperature is not recorded, or where either cannot be.
 */
function factorOf(
  { temperatureC, humidityPercent }: TraceColumns,
  from: number,
  to: number,
  pressureKpa: number,
): number | null {
  if (!temperatureC) return null
  const meanC = meanOf(temperatureC, from, to)
  const share = humidityPercent ? meanOf(humidityPercent, from, to) / 100 : 1
  if (!(meanC >= COLDEST_C && meanC <= WARMEST_C && share >= 0)) return null
  const factor = btpsFactor(meanC, share * saturationPressureKpa(meanC), pressureKpa)
  return factor > 0 ? finiteOrNull(factor) : null
}

function meanOf(values: Float64Array, from: number, to: number): number {
  let sum = 0
  for (let i = from; i < to; i++) sum += values[i]!
  return sum / (to - from)
}
