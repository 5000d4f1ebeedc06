import type { Clock } from '../breaths/Clock.ts'
import type { FlowRun } from '../breaths/FlowRun.ts'
import type { AnalyteSettings, TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'

/** One gas of a trace, brought to CO2's time. */
export type TraceGas = {
  analyte: string
  /** The instrument's data of the file with the settings over it. */
  known: Partial<AnalyteSettings>
  /** As recorded. */
  rawPpb: Float64Array
  /** At CO2's instants; NaN where the record does not reach or has a gap. */
  ppb: Float64Array
  /** Instrument's delay in ticks. */
  delayTicks: number
  roomAirPpb: number | null
}

/** Everything that the figures of an exhalation are made from. */
export type Trace = {
  columns: TraceColumns
  clock: Clock
  settings: TraceSettings
  inspiredCo2Percent: number
  /** As long as the columns; whoever puts values in order overwrites it. */
  scratch: Float64Array
  gases: TraceGas[]
  /** The run of outward flow that holds samples first…last; null where flow is not recorded. */
  runHolding: (first: number, last: number) => FlowRun | null
}
