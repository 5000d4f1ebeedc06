import type { FigureTable } from './figureTable.ts'

/** The deviation at every averaging length. */
export function allanTable(props: {
  points: readonly { m: number; tauS: number; deviation: number; terms: number }[]
  unit?: string
}): FigureTable {
  return {
    caption: 'Allan deviation by averaging time',
    columns: [
      { key: 'tauS', label: 'Averaging time', unit: 's', format: 'concentration' },
      { key: 'm', label: 'Readings averaged', format: 'count' },
      { key: 'deviation', label: 'Allan deviation', unit: props.unit, format: 'concentration' },
      { key: 'terms', label: 'Differences', format: 'count' },
    ],
    rows: props.points.map((point) => ({ ...point })),
  }
}
