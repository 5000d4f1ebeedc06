import type { Clock } from '../breaths/Clock.ts'
import { percentileOf } from '../ordering/percentileOf.ts'
import type { AnalyteSettings, TraceSettings } from '../settings/TraceSettings.ts'
import type { GasColumn, TraceColumns } from '../TraceColumns.ts'
import { TraceError } from '../TraceError.ts'
import { alignToCo2 } from './alignToCo2.ts'
import type { TraceGas } from './Trace.ts'

/**
 * One gas of the trace with what is known of it, aligned to CO2, and its room air: the median of the
 * samples marked as such, unless the settings give a room air measured apart.
 * @throws TraceError at the gas's column where its transport delay is beyond `longestDelayS`
 */
export function traceGas(
  gas: GasColumn,
  columns: TraceColumns,
  clock: Clock,
  isRoomAir: Uint8Array,
  scratch: Float64Array,
  settings: TraceSettings,
): TraceGas {
  const { analyte, ppb: rawPpb } = gas
  const given = Object.hasOwn(settings.analytes, analyte) ? settings.analytes[analyte] : undefined
  const known: Partial<AnalyteSettings> = { ...gas.instrument, ...given }
  const delayS = known.transportDelayS ?? 0
  if (Math.abs(delayS) > settings.longestDelayS) {
    throw new TraceError(
      columns.headerLine,
      gas.column,
      `The transport delay of this gas is beyond ${settings.longestDelayS} s.`,
    )
  }
  const ppb = alignToCo2(columns.timeS, rawPpb, clock, delayS, settings.gapS)
  return {
    analyte,
    known,
    rawPpb,
    ppb,
    delayTicks: clock.ticks(delayS),
    roomAirPpb: known.roomAirPpb ?? medianWhere(ppb, isRoomAir, scratch),
  }
}

function medianWhere(
  values: Float64Array,
  isWanted: Uint8Array,
  scratch: Float64Array,
): number | null {
  let count = 0
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!
    if (isWanted[i] && Number.isFinite(value)) scratch[count++] = value
  }
  return count === 0 ? null : percentileOf(scratch, count, 50)
}
