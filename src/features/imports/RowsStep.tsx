import { useState } from 'react'
import type { DataImport, ImportCounts, ImportMapping } from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import type { Site } from '#shared/schemas/site.ts'
import { Notice } from '../../ui/Notice.tsx'
import { EnterForm } from './EnterForm.tsx'
import { PreviewCounts } from './PreviewCounts.tsx'
import { PreviewRows } from './PreviewRows.tsx'
import { useTabDraft } from './useTabDraft.ts'

type RowsStepProps = {
  studyId: string
  of: DataImport & { mapping: ImportMapping; counts: ImportCounts }
  analytes: readonly Analyte[]
  sites: readonly Site[]
  locked?: string
}

/** What the check found, row by row, and the button that enters it. */
export function RowsStep({ studyId, of, analytes, sites, locked }: RowsStepProps) {
  // The lines belong to this check of the file: the next one begins anew.
  const draft = useTabDraft<string[]>(`import ${of.id} ${of.version} left out`)
  const [lines, setLines] = useState<ReadonlySet<string>>(() => new Set(draft.first ?? []))
  const leaveOut = (chosen: ReadonlySet<string>) => {
    setLines(chosen)
    draft.keep([...chosen])
  }
  const enterable = of.counts.new > lines.size
  return (
    <>
      {of.counts.new === 0 && (
        <Notice title="Nothing of this file is left to enter">
          Discard it, so that it does not stand in the way of the lock
          {of.counts.refused > 0 ? ', or mend the refused rows and bring the mended file in' : ''}.
        </Notice>
      )}
      <PreviewCounts counts={of.counts} />
      <PreviewRows
        studyId={studyId}
        of={of}
        analytes={analytes}
        sites={sites}
        leftOut={locked === undefined ? { lines, onChange: leaveOut } : null}
      />
      {enterable && (
        <section aria-labelledby="import-enter" className="border-t border-rule pt-5">
          <h2 id="import-enter">Enter the rows</h2>
          <EnterForm
            studyId={studyId}
            of={of}
            leaveOut={lines}
            locked={locked}
            onEntering={draft.clear}
          />
        </section>
      )}
    </>
  )
}
