import { Link } from 'react-router-dom'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Reference } from '#shared/schemas/reference.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import type { TableColumn } from '../../ui/tableColumn.ts'
import { OutcomeText } from './OutcomeText.tsx'

/** All the digits that a double can carry: values are shown as they were entered. */
const AS_ENTERED = 15

/** The analytes of which the reference analyser gave any value in these rows. */
export function measuredAnalytes(
  rows: readonly Reference[],
  analytes: readonly Analyte[],
): Analyte[] {
  const measured = new Set(rows.flatMap((row) => row.measurements.map((each) => each.analyteId)))
  return analytes.filter((analyte) => measured.has(analyte.id))
}

/** For the list of all subjects with anything of the reference. */
export function referenceColumns(
  measured: readonly Analyte[],
  severalSites: boolean,
): TableColumn<Reference>[] {
  return [
    {
      id: 'code',
      header: 'Subject',
      value: (row) => row.subjectCode,
      cell: (row) => (
        <Link to={`../subjects/${row.subjectId}`} className="link whitespace-nowrap">
          {row.subjectCode}
        </Link>
      ),
      mono: true,
    },
    ...(severalSites
      ? [{ id: 'site', header: 'Site', value: (row: Reference) => row.siteName }]
      : []),
    {
      id: 'outcome',
      header: 'Outcome',
      value: (row) => row.outcome,
      cell: (row) => <OutcomeText outcome={row.outcome} />,
    },
    ...measured.map((analyte) => analyserColumn(analyte)),
  ]
}

function analyserColumn(analyte: Analyte): TableColumn<Reference> {
  const unit = unitLabel(analyte.unit)
  const valuesOf = (row: Reference) =>
    row.measurements.filter((each) => each.analyteId === analyte.id)
  return {
    id: analyte.id,
    header: `${analyte.name} by the analyser${unit ? `, ${unit}` : ''}`,
    value: (row) => valuesOf(row)[0]?.value,
    cell: (row) => <Values values={valuesOf(row)} />,
    numeric: true,
  }
}

/** One number, or one line for each session. */
function Values({ values }: { values: Reference['measurements'] }) {
  if (values.length === 0) return <span className="text-ink-2">–</span>
  return values.map(({ sessionNumber, value }) => (
    <span key={sessionNumber} className="block">
      {values.length > 1 && (
        <span className="mr-3 text-sm text-ink-2">session {sessionNumber}</span>
      )}
      {formatConcentration(value, AS_ENTERED)}
    </span>
  ))
}
