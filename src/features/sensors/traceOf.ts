import { analyseTrace } from '#shared/breath/analyseTrace.ts'
import { clockOf } from '#shared/breath/breaths/clockOf.ts'
import { readColumns } from '#shared/breath/file/readColumns.ts'
import { alignToCo2 } from '#shared/breath/readings/alignToCo2.ts'
import { defaultSettings } from '#shared/breath/settings/defaultSettings.ts'
import type { TraceSettings } from '#shared/breath/settings/TraceSettings.ts'
import type { TraceColumns } from '#shared/breath/TraceColumns.ts'
import { TraceError } from '#shared/breath/TraceError.ts'
import type { TraceResult } from '#shared/breath/TraceResult.ts'

/** What somebody chose on the page; all else is the protocol's default. */
export type TraceChoices = Pick<TraceSettings, 'subject' | 'targetFlowMlS' | 'sessionRule'> & {
  /** Asked for every gas of the file; the reading refuses it where it must not be done. */
  normalise: boolean
  correctDilution: boolean
  /** U of the calibration with k = 2, percent of the value. */
  calibrationExpandedPercent?: number
}

/** One exhalation and a second on either side, as drawn; the gases in the order of the file, aligned to CO2. */
export type ExhalationCurve = {
  timeS: Float64Array
  co2Percent: Float64Array
  /** ppb; NaN where the aligned record has none. */
  gases: Float64Array[]
}

export type TraceOutcome =
  | { refusal: { line: number; column: number; reason: string } }
  | { refusal: null; result: TraceResult; curves: ExhalationCurve[] }

const AROUND_S = 1

/** Reads a trace and cuts the curves of its exhalations; a file that cannot be read is a refusal. */
export async function traceOf(
  source: string | AsyncIterable<Uint8Array>,
  choices: TraceChoices,
): Promise<TraceOutcome> {
  try {
    const columns = await readColumns(source)
    const result = analyseTrace(columns, settingsOf(choices, columns))
    return { refusal: null, result, curves: curvesOf(columns, result) }
  } catch (error) {
    if (!(error instanceof TraceError)) throw error
    const { line, column, reason } = error
    return { refusal: { line, column, reason } }
  }
}

function settingsOf(choices: TraceChoices, { gases }: TraceColumns): Partial<TraceSettings> {
  const { normalise, correctDilution, calibrationExpandedPercent, ...settings } = choices
  const names = gases.map(({ analyte }) => analyte)
  return {
    ...settings,
    normalise: normalise ? names : [],
    correctDilution: correctDilution ? names : [],
    analytes:
      calibrationExpandedPercent === undefined
        ? {}
        : Object.fromEntries(names.map((name) => [name, { calibrationExpandedPercent }])),
  }
}

function curvesOf(columns: TraceColumns, { exhalations, analytes }: TraceResult) {
  const { timeS, co2Percent, gases } = columns
  const clock = clockOf(timeS, new Float64Array(timeS.length))
  const aligned = gases.map(({ ppb }, at) => {
    const delayS = analytes[at]!.instrument.transportDelayS ?? 0
    return alignToCo2(timeS, ppb, clock, delayS, defaultSettings.gapS)
  })
  let from = 0
  return exhalations.map(({ startS, endS }): ExhalationCurve => {
    while (timeS[from]! < startS - AROUND_S) from++
    let to = from
    while (to < timeS.length && timeS[to]! <= endS + AROUND_S) to++
    return {
      timeS: timeS.slice(from, to),
      co2Percent: co2Percent.slice(from, to),
      gases: aligned.map((values) => values.slice(from, to)),
    }
  })
}
