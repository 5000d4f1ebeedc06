import type { Analyte } from '#shared/schemas/protocol.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** What the study measures. */
export function AnalytesTable({ analytes }: { analytes: readonly Analyte[] }) {
  return (
    <StaticTable
      caption="Analytes"
      columns={[
        { header: 'Analyte' },
        { header: 'Unit' },
        { header: 'Formula' },
        { header: 'CAS number' },
        { header: 'Molar mass', numeric: true },
      ]}
      rows={analytes.map((analyte) => ({
        key: analyte.id,
        cells: [
          analyte.name,
          unitLabel(analyte.unit) || 'no unit',
          analyte.formula ?? '–',
          analyte.casNumber ?? '–',
          analyte.molarMassGPerMol === null
            ? '–'
            : `${formatConcentration(analyte.molarMassGPerMol, 15)} g/mol`,
        ],
      }))}
    />
  )
}
