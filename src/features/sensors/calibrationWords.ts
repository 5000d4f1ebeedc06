import type { Interval } from '#shared/statistics/Interval.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { unitOf } from './columnHints.ts'

/** As the headings of the columns give them. */
export type CalibrationUnits = { level: string | undefined; signal: string | undefined }

export const unitsOf = (columns: {
  levelColumn: string
  signalColumn: string
}): CalibrationUnits => ({
  level: unitOf(columns.levelColumn),
  signal: unitOf(columns.signalColumn),
})

/** "Level (ppb)". */
export const withUnit = (words: string, unit: string | undefined): string =>
  unit ? `${words} (${unit})` : words

export const intervalWords = ({ lower, upper }: Interval): string =>
  `${formatConcentration(lower, 5)} to ${formatConcentration(upper, 5)}`

/** "300.1 ppb". */
export const amount = (value: number, unit: string | undefined, digits = 4): string =>
  unit ? `${formatConcentration(value, digits)} ${unit}` : formatConcentration(value, digits)
