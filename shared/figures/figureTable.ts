import {
  formatConcentration,
  formatCount,
  formatEstimate,
  NOT_ESTIMABLE,
} from '../terms/numbers.ts'

/** The numbers behind a figure: screen, file and printed page show this one table. */
export interface FigureTable {
  caption: string
  columns: readonly FigureTableColumn[]
  rows: readonly Readonly<Record<string, FigureTableValue>>[]
}

/** null means that there is no such number, and is written out as that. */
export type FigureTableValue = string | number | null

export interface FigureTableColumn {
  key: string
  label: string
  /** Unit of every number of the column; none for counts and proportions. */
  unit?: string
  format: 'text' | 'count' | 'proportion' | 'concentration'
}

/** The words of one cell. Infinite thresholds, above or below every value, are said as that. */
export function formatCell(column: FigureTableColumn, value: FigureTableValue): string {
  if (value === null) return NOT_ESTIMABLE
  if (typeof value === 'string') return value
  if (column.format === 'count') return formatCount(value)
  if (column.format === 'proportion') return formatEstimate(value, 3)
  return formatConcentration(value)
}

/** "Threshold (ppb)". */
export function columnHeading({ label, unit }: FigureTableColumn): string {
  return unit ? `${label} (${unit})` : label
}
