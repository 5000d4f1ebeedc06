import type { ReactNode } from 'react'
import { ApiError } from '../api/ApiError.ts'
import { Button } from '../ui/Button.tsx'
import { Notice } from '../ui/Notice.tsx'
import { StaticTable } from '../ui/StaticTable.tsx'

type ChangedMeanwhileProps = {
  /** "this subject" */
  what: string
  rows: readonly { label: string; mine: ReactNode; stored: ReactNode }[]
  /** The person saw what is stored now and keeps their own. */
  onKeepMine: () => void
  /** The person gives their own up. */
  onKeepStored: () => void
}

/** Both versions side by side, after somebody else was quicker. */
export function ChangedMeanwhile({ what, rows, onKeepMine, onKeepStored }: ChangedMeanwhileProps) {
  return (
    <div className="mb-5">
      <Notice tone="warn" title={`Somebody changed ${what} meanwhile`} announce>
        <p>Nothing of yours is stored yet. Look at both and choose.</p>
        <div className="mt-2 rounded-[3px] bg-sheet text-ink">
          <StaticTable
            caption="Your version and the stored one"
            columns={[{ header: 'Field' }, { header: 'Yours' }, { header: 'Stored now' }]}
            rows={rows.map(({ label, mine, stored }) => ({
              key: label,
              cells: [label, mine, stored],
            }))}
          />
        </div>
        <div className="mt-3 flex flex-wrap gap-2">
          <Button size="small" onClick={onKeepMine}>
            Put mine in its place
          </Button>
          <Button kind="quiet" size="small" onClick={onKeepStored}>
            Leave what is stored
          </Button>
        </div>
      </Notice>
    </div>
  )
}

export const isChangedMeanwhile = (error: unknown): boolean =>
  error instanceof ApiError && error.code === 'changed-meanwhile'
