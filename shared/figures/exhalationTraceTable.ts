import type { ExhalationGas, ExhalationSample } from './exhalationSamples.ts'
import type { FigureTable } from './figureTable.ts'

/** Every sample of an exhalation, none left out. */
export function exhalationTraceTable(props: {
  number: number
  samples: readonly ExhalationSample[]
  gas: ExhalationGas
}): FigureTable {
  const { number, samples, gas } = props
  return {
    caption: `Exhalation ${number}: ${gas.label} and CO2 over time`,
    columns: [
      { key: 'timeS', label: 'Time', unit: 's', format: 'concentration' },
      { key: 'co2Percent', label: 'CO2', unit: '%', format: 'concentration' },
      { key: 'gas', label: gas.label, unit: gas.unit, format: 'concentration' },
    ],
    rows: samples.map((sample) => ({ ...sample })),
  }
}
