import { type ReactNode, useState } from 'react'
import { ApiError } from '../api/ApiError.ts'
import { Button } from '../ui/Button.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Notice } from '../ui/Notice.tsx'
import { StaticTable } from '../ui/StaticTable.tsx'

type ChangedMeanwhileProps = {
  /** "this subject" */
  what: string
  rows: readonly { label: string; mine: ReactNode; stored: ReactNode }[]
  /** The person saw what is stored now and keeps their own; throws where that is refused. */
  onKeepMine: () => Promise<unknown>
  /** The person gives their own up. */
  onKeepStored: () => void
}

/** Both versions side by side, after somebody else was quicker. */
export function ChangedMeanwhile({ what, rows, onKeepMine, onKeepStored }: ChangedMeanwhileProps) {
  const [saving, setSaving] = useState(false)
  const [refusal, setRefusal] = useState<Error | null>(null)
  const keepMine = async () => {
    setSaving(true)
    setRefusal(null)
    try {
      await onKeepMine()
    } catch (error) {
      setRefusal(error as Error)
    } finally {
      setSaving(false)
    }
  }
  return (
    <div className="mb-5">
      <Notice tone="warn" title={`Somebody changed ${what} meanwhile`} announce>
        <p>
          Nothing of yours is stored yet. What you did not change stands as it is stored now. Look
          at both and choose.
        </p>
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
        {refusal && <ErrorNotice what="Yours was not saved" error={refusal} />}
        <div className="mt-3 flex flex-wrap gap-2">
          <Button size="small" busy={saving && 'Saving…'} onClick={() => void keepMine()}>
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
