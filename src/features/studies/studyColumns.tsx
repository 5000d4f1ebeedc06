import { Link } from 'react-router-dom'
import type { StudySummary } from '#shared/schemas/study.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { ROLE_LABELS } from '#shared/terms/team.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

export const studyColumns: TableColumn<StudySummary>[] = [
  {
    id: 'code',
    header: 'Study',
    value: (study) => study.code,
    cell: (study) => (
      <Link to={`/studies/${study.id}`} className="link font-semibold whitespace-nowrap">
        {study.code}
      </Link>
    ),
    sortable: true,
  },
  { id: 'title', header: 'Title', value: (study) => study.title, sortable: true },
  {
    id: 'kind',
    header: 'Kind',
    value: (study) => study.kind,
    cell: (study) => (
      <span className="flex flex-wrap gap-1.5">
        {study.kind === 'earlierData' ? (
          <Tag tone="warn">Earlier data, unblinded</Tag>
        ) : (
          <Tag>Prospective</Tag>
        )}
        {study.demonstration && <Tag>Demonstration</Tag>}
      </span>
    ),
  },
  {
    id: 'subjects',
    header: 'Subjects',
    value: (study) => study.subjectCount,
    cell: (study) => formatCount(study.subjectCount),
    numeric: true,
    sortable: true,
  },
  {
    id: 'roles',
    header: 'You are',
    value: (study) => study.roles.map((role) => ROLE_LABELS[role]).join(', '),
  },
  {
    id: 'locked',
    header: 'Data',
    value: (study) => study.lockedAt,
    cell: (study) =>
      study.lockedAt ? (
        <span className="whitespace-nowrap">
          Locked <InstantText at={study.lockedAt} precision="day" />
        </span>
      ) : (
        'Open'
      ),
  },
]
