import type { FigureTable } from './figureTable.ts'

/** What sensor and reference analyser gave for one subject. */
export interface ReadingPair {
  reference: number
  sensor: number
  subject?: string
}

/** Every pair behind the plot. */
export function scatterIdentityTable(props: {
  pairs: readonly ReadingPair[]
  unit: string
}): FigureTable {
  const { pairs, unit } = props
  const named = pairs.some(({ subject }) => subject)
  return {
    caption: 'Sensor and reference of every pair',
    columns: [
      ...(named ? [{ key: 'subject', label: 'Subject', format: 'text' as const }] : []),
      { key: 'reference', label: 'Reference', unit, format: 'concentration' },
      { key: 'sensor', label: 'Sensor', unit, format: 'concentration' },
    ],
    rows: pairs.map(({ subject, reference, sensor }) => ({
      subject: subject ?? 'not named',
      reference,
      sensor,
    })),
  }
}
