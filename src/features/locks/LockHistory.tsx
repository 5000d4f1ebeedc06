import type { Lock } from '#shared/schemas/lock.ts'
import { LOCK_STATE_LABELS, type LockState } from '#shared/terms/lockState.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { Tag, type TagTone } from '../../ui/Tag.tsx'

const TONES: Record<LockState, TagTone> = {
  requested: 'warn',
  returned: 'stop',
  withdrawn: 'plain',
  approved: 'good',
}

/** Requests that are decided, with the reasons that were given. */
export function LockHistory({ locks }: { locks: readonly Lock[] }) {
  if (locks.length === 0) return null
  return (
    <>
      <h2 className="mt-6">Earlier requests</h2>
      <StaticTable
        caption="Requests for the lock that were decided"
        columns={[
          { header: 'No.' },
          { header: 'Asked for' },
          { header: 'What became of it' },
          { header: 'By' },
          { header: 'Reason' },
        ]}
        rows={locks.map((lock) => ({
          key: lock.id,
          cells: [
            lock.number,
            <span key="asked">
              {lock.requestedByName}, <InstantText at={lock.requestedAt} />
            </span>,
            <Tag key="state" tone={TONES[lock.state]}>
              {LOCK_STATE_LABELS[lock.state]}
            </Tag>,
            <span key="by">
              {lock.decidedByName}
              {lock.decidedAt && (
                <>
                  , <InstantText at={lock.decidedAt} />
                </>
              )}
            </span>,
            lock.decisionNote ?? '',
          ],
        }))}
      />
    </>
  )
}
