import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Reference } from '#shared/schemas/reference.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { Facts } from '../../ui/Facts.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { OutcomeText } from './OutcomeText.tsx'

type SubjectReferenceProps = { reference: Reference | undefined; analytes: readonly Analyte[] }

/** Outcome and analyser values of one subject. */
export function SubjectReference({ reference, analytes }: SubjectReferenceProps) {
  if (!reference) return <p className="text-ink-2">Nothing entered.</p>
  const analyteOf = (id: string) => analytes.find((analyte) => analyte.id === id)
  return (
    <>
      <Facts
        layout="rows"
        items={[{ term: 'Outcome', value: <OutcomeText outcome={reference.outcome} /> }]}
      />
      {reference.measurements.length > 0 && (
        <div className="mt-3">
          <StaticTable
            caption="Values of the reference analyser"
            columns={[
              { header: 'Reference analyser' },
              { header: 'Session', numeric: true },
              { header: 'Value', numeric: true },
            ]}
            rows={reference.measurements.map(({ sessionNumber, analyteId, value }) => ({
              key: `${sessionNumber} ${analyteId}`,
              cells: [
                analyteOf(analyteId)?.name,
                sessionNumber,
                `${formatConcentration(value, 15)} ${unitLabel(analyteOf(analyteId)?.unit ?? '')}`,
              ],
            }))}
          />
        </div>
      )}
    </>
  )
}
