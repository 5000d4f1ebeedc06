import { Link } from 'react-router-dom'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Session } from '#shared/schemas/session.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

/** All the digits that a double can carry: values are shown as they were entered. */
const AS_ENTERED = 15

type Value = Session['values'][number]

/** Columns of the sensor's values, one for each analyte with its unit. */
function valueColumns(analytes: readonly Analyte[]): TableColumn<Session>[] {
  return analytes.map((analyte) => {
    const unit = unitLabel(analyte.unit)
    const entryOf = (session: Session) =>
      session.values.find((value) => value.analyteId === analyte.id)
    return {
      id: analyte.id,
      header: unit ? `${analyte.name}, ${unit}` : analyte.name,
      value: (session) => entryOf(session)?.value,
      cell: (session) => <ValueText value={entryOf(session)} />,
      numeric: true,
    }
  })
}

function ValueText({ value }: { value: Value | undefined }) {
  if (!value) return <span className="text-ink-2">–</span>
  const text = formatConcentration(value.value, AS_ENTERED)
  if (!value.belowLod) return text
  return (
    <span className="inline-flex items-baseline gap-2">
      <Tag>
        <span aria-hidden="true">&lt; LoD</span>
        <span className="sr-only">below the limit of detection</span>
      </Tag>
      {text}
    </span>
  )
}

const number: TableColumn<Session> = {
  id: 'number',
  header: 'Session',
  value: (session) => session.number,
}

const startedAt: TableColumn<Session> = {
  id: 'startedAt',
  header: 'Started',
  value: (session) => session.startedAt,
  cell: (session) =>
    session.startedAt ? (
      <span className="whitespace-nowrap">
        <InstantText at={session.startedAt} />
      </span>
    ) : (
      <span className="text-ink-2">not known</span>
    ),
}

/** For the list of all sessions. */
export function sessionColumns(
  analytes: readonly Analyte[],
  severalSites: boolean,
): TableColumn<Session>[] {
  return [
    {
      id: 'code',
      header: 'Subject',
      value: (session) => session.subjectCode,
      cell: (session) => (
        <Link to={`../subjects/${session.subjectId}`} className="link whitespace-nowrap">
          {session.subjectCode}
        </Link>
      ),
      mono: true,
    },
    ...(severalSites
      ? [{ id: 'site', header: 'Site', value: (session: Session) => session.siteName }]
      : []),
    number,
    startedAt,
    ...valueColumns(analytes),
  ]
}

/** For the sessions of one subject. */
export const ownSessionColumns = (analytes: readonly Analyte[]): TableColumn<Session>[] => [
  number,
  startedAt,
  ...valueColumns(analytes),
]
