import { Link } from 'react-router-dom'
import type { LockCheck } from '#shared/schemas/lock.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { Tag, type TagTone } from '../../ui/Tag.tsx'
import { lockCheckLink } from './lockCheckLinks.ts'

type LockChecklistProps = {
  studyId: string
  checks: readonly LockCheck[]
  /** As it stood when it was decided: nothing to mend any more. */
  past?: boolean
}

const COUNTED = [{ header: 'Check' }, { header: 'Standing' }, { header: 'Left', numeric: true }]
const COLUMNS = [...COUNTED, { header: 'Where' }]
/** Both tables share their columns, so that the eye goes straight down. */
const SAME_COLUMNS =
  'tablet:[&_table]:table-fixed tablet:[&_th:nth-child(1)]:w-[44%] tablet:[&_th:nth-child(2)]:w-[28%] tablet:[&_th:nth-child(3)]:w-[9%]'

/** What has to be settled before the lock, and what is worth knowing before it is signed. */
export function LockChecklist({ studyId, checks, past = false }: LockChecklistProps) {
  const blocking = checks.filter((check) => check.blocking)
  const informative = checks.filter((check) => !check.blocking)
  const rows = (of: readonly LockCheck[]) =>
    of.map((check) => ({
      key: check.key,
      cells: [
        check.label,
        <Tag key="standing" tone={toneOf(check)}>
          {check.detail}
        </Tag>,
        formatCount(check.left),
        check.left > 0 && !past ? <CheckLink key="where" studyId={studyId} check={check} /> : null,
      ],
    }))
  const columns = past ? COUNTED : COLUMNS
  return (
    <div className={SAME_COLUMNS}>
      <h2>{past ? 'Before it closed' : 'Before it can close'}</h2>
      <StaticTable
        caption="Checks that must be at nought"
        columns={columns}
        rows={rows(blocking)}
      />
      <h2 className="mt-6">
        {past ? 'Known when it was signed' : 'Worth knowing before it is signed'}
      </h2>
      <StaticTable
        caption="Counts that do not stand in the way"
        columns={columns}
        rows={rows(informative)}
      />
    </div>
  )
}

function CheckLink({ studyId, check }: { studyId: string; check: LockCheck }) {
  const { to, label } = lockCheckLink(studyId, check.key)
  return (
    <Link to={to} className="link whitespace-nowrap" aria-label={`${label}: ${check.label}`}>
      {label}
    </Link>
  )
}

function toneOf({ left, blocking }: LockCheck): TagTone {
  if (left === 0) return 'good'
  return blocking ? 'stop' : 'warn'
}
