import type { CalibrationAxis } from './calibrationTypes.ts'
import type { FigureTable } from './figureTable.ts'

/** Every reading behind the line and the residuals. */
export function calibrationTable(props: {
  readings: readonly { level: number; signal: number; found: number; percent: number | null }[]
  level: CalibrationAxis
  signal: CalibrationAxis
}): FigureTable {
  const { readings, level, signal } = props
  return {
    caption: 'Readings of the standards and what the line makes of them',
    columns: [
      { key: 'level', label: level.label, unit: level.unit, format: 'concentration' },
      { key: 'signal', label: signal.label, unit: signal.unit, format: 'concentration' },
      { key: 'found', label: 'Back-calculated', unit: level.unit, format: 'concentration' },
      { key: 'percent', label: 'Residual', unit: '%', format: 'concentration' },
    ],
    rows: readings.map((reading) => ({ ...reading })),
  }
}
