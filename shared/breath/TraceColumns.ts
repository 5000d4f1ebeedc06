import type { InstrumentData } from './settings/InstrumentData.ts'

/** One gas of a trace, as recorded (not yet aligned). */
export type GasColumn = {
  /** Name in snake case, such as nitric_oxide. */
  analyte: string
  /** Cell in the header, from 1. */
  column: number
  ppb: Float64Array
  /** What the file's `#` lines say of the instrument for this gas. */
  instrument: Partial<InstrumentData>
}

/** What the file's `#` lines say of the recording. */
export type Recording = {
  instrumentSerial: string | null
  /** As written, ISO 8601 with its offset. */
  startedAt: string | null
  firmware: string | null
}

/** The numbers of a trace file, one array of equal length per column. */
export type TraceColumns = {
  recording: Recording
  /** For errors that show only once the whole file is read: sample i stands in line firstLine + i. */
  headerLine: number
  firstLine: number
  timeColumn: number
  co2Column: number
  timeS: Float64Array
  co2Percent: Float64Array
  flowMlS: Float64Array | null
  pressureCmH2o: Float64Array | null
  temperatureC: Float64Array | null
  humidityPercent: Float64Array | null
  gases: GasColumn[]
}
