import { Link } from 'react-router-dom'
import type { StudyKind } from '#shared/policy/people.ts'
import type { Subject } from '#shared/schemas/subject.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'
import { SessionGlyphs } from './SessionGlyphs.tsx'
import { ageBandWords, sexMark } from './subjectWords.ts'

/** Columns of the list of subjects; a code's prefix says its site. */
export function subjectColumns(kind: StudyKind): TableColumn<Subject>[] {
  return [
    {
      id: 'code',
      header: 'Subject',
      value: (subject) => subject.code,
      cell: (subject) => (
        <Link to={subject.id} className="link whitespace-nowrap">
          {subject.code}
        </Link>
      ),
      mono: true,
      sortable: true,
    },
    {
      id: 'enrolledAt',
      header: kind === 'earlierData' ? 'Entered' : 'Enrolled',
      value: (subject) => subject.enrolledAt,
      cell: (subject) => (
        <span className="whitespace-nowrap">
          <InstantText at={subject.enrolledAt} precision="day" />
        </span>
      ),
      sortable: true,
    },
    { id: 'ageBand', header: 'Age band', value: (subject) => ageBandWords(subject.ageBand) },
    { id: 'sex', header: 'Sex', value: (subject) => sexMark(subject.sex) },
    {
      id: 'sessions',
      header: 'Breath sessions',
      value: (subject) => subject.sessionCount,
      cell: (subject) => <SessionGlyphs count={subject.sessionCount} />,
    },
    {
      id: 'reference',
      header: 'Reference',
      value: (subject) => (subject.outcomeDecided ? 'Decided' : '–'),
    },
    {
      id: 'next',
      header: 'Next',
      value: () => null,
      cell: (subject) => (
        <span className="tablet:whitespace-nowrap">
          <Next subject={subject} />
        </span>
      ),
    },
  ]
}

function Next({ subject: { sessionCount, outcomeDecided } }: { subject: Subject }) {
  if (sessionCount === 0) return <Tag tone="warn">Needs a session</Tag>
  if (!outcomeDecided) return <Tag tone="warn">Needs an outcome</Tag>
  return <Tag tone="good">Complete</Tag>
}
