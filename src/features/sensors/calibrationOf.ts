import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { type BackCalculated, backCalculated } from '#shared/statistics/sensor/backCalculated.ts'
import {
  type CalibrationLine,
  type CalibrationWeights,
  calibrationLine,
} from '#shared/statistics/sensor/calibrationLine.ts'
import { type DetectionLimits, detectionLimits } from '#shared/statistics/sensor/detectionLimits.ts'
import {
  type InversePrediction,
  inversePrediction,
} from '#shared/statistics/sensor/inversePrediction.ts'
import { LEVEL_HINT, SIGNAL_HINT, suggestedColumn } from './columnHints.ts'
import { type CsvTable, numbersIn, type Refusal, readCsv } from './csvTable.ts'

/** What somebody gave and chose on the calibration page. */
export type StandardsGiven = {
  text: string
  /** As chosen, or null for the one that the headings suggest. */
  levelColumn: string | null
  signalColumn: string | null
  weights: CalibrationWeights
}

export type Standards = {
  table: CsvTable
  levelColumn: string
  signalColumn: string
  levels: number[]
  signals: number[]
  refused: Refusal[]
}

/** The standards in a text, or why there are none. */
export function readStandards(
  given: StandardsGiven,
): { standards: Standards; problem: null } | { standards: null; problem: string } {
  const read = readCsv(given.text)
  if ('problem' in read) return { standards: null, problem: read.problem }
  const { table } = read
  const { headings } = table
  const levelColumn = chosen(given.levelColumn, headings, LEVEL_HINT, 0)
  const signalColumn = chosen(given.signalColumn, headings, SIGNAL_HINT, -1)
  const { rows, refused } = numbersIn(table, [levelColumn, signalColumn])
  return {
    problem: null,
    standards: {
      table,
      levelColumn,
      signalColumn,
      levels: rows.map((row) => row[0]!),
      signals: rows.map((row) => row[1]!),
      refused,
    },
  }
}

function chosen(
  column: string | null,
  headings: readonly string[],
  hint: RegExp,
  otherwise: number,
): string {
  return column !== null && headings.includes(column)
    ? column
    : suggestedColumn(headings, hint, otherwise)
}

export type Calibration = {
  line: CalibrationLine
  back: BackCalculated[]
  /** Every reading with the level that the line makes of it. */
  readings: { level: number; signal: number; found: number; percent: number | null }[]
}

/** The line through standards and what it makes of them, or what to do about a refusal. */
export function calibrate(
  { levels, signals, levelColumn, signalColumn }: Standards,
  weights: CalibrationWeights,
): { calibration: Calibration; problem: null } | { calibration: null; problem: string } {
  if (levelColumn === signalColumn)
    return { calibration: null, problem: 'Level and signal are the same column. Choose two.' }
  try {
    const line = calibrationLine({ levels, signals }, { weights })
    const readings = levels.map((level, at) => {
      const signal = signals[at]!
      const found = (signal - line.intercept) / line.slope
      return { level, signal, found, percent: level === 0 ? null : (100 * (found - level)) / level }
    })
    return {
      calibration: { line, back: backCalculated({ levels, signals }, line), readings },
      problem: null,
    }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    return { calibration: null, problem: calibrationRefusal(error) }
  }
}

function calibrationRefusal({ code, message }: StatisticsError): string {
  if (code === 'too-few') return `${message} Give more standards, or choose other columns.`
  if (code === 'constant')
    return `${message} Choose the columns of level and signal; at least two levels are needed, and a signal that follows them.`
  return message
}

/** The level that a typed signal points to; a weighted line has no limits for it. */
export function levelOfSignal(
  { line }: Calibration,
  meanSignal: number,
  readings: number,
): { found: InversePrediction; note: string | null } {
  const found = inversePrediction(line, { meanSignal, readings })
  const note =
    line.weights === 'none'
      ? (found.notDefined?.sentence ?? null)
      : 'Limits are for an unweighted line: choose no weights to see them.'
  return { found, note }
}

/** Limits by residual SD (no meaning on a weighted line), by the intercept and by blanks. */
export function limitsOf(
  { line }: Calibration,
  blankSd: number | null,
): Omit<DetectionLimits, 'fromResidualSd'> & {
  fromResidualSd: DetectionLimits['fromResidualSd'] | null
} {
  const limits = detectionLimits(line, blankSd ?? undefined)
  return { ...limits, fromResidualSd: line.weights === 'none' ? limits.fromResidualSd : null }
}
