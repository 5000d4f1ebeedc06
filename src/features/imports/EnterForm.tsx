import { z } from 'zod'
import { reasonForChange } from '#shared/schemas/common.ts'
import type { DataImport } from '#shared/schemas/import.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { useEnterImport } from './imports.api.ts'

const REASONS = [
  'The earlier data of this study are brought in',
  'Further sessions of subjects are brought in',
  'Reference values of subjects are brought in',
  'A mended file is brought in',
]

type EnterFormProps = {
  studyId: string
  of: DataImport
  leaveOut: ReadonlySet<string>
  locked?: string
  onEntering: () => void
}

/** Enters what the check found, but for the lines that stay out. */
export function EnterForm({ studyId, of, leaveOut, locked, onEntering }: EnterFormProps) {
  const enter = useEnterImport(studyId, of.id)
  const rows = (of.counts?.new ?? 0) - leaveOut.size
  return (
    <Form
      schema={z.object({ reasonForChange })}
      defaultValues={{ reasonForChange: '' }}
      submitLabel={rows === 1 ? 'Enter 1 row' : `Enter ${formatCount(rows)} rows`}
      busyLabel="Handing over…"
      locked={locked}
      onSubmit={(values) =>
        enter.mutateAsync({
          ...values,
          leaveOutLines: [...leaveOut].map(Number),
          version: of.version,
        })
      }
      onSaved={onEntering}
    >
      <div className="max-w-[80ch] text-ink-2">
        <p>
          {leaveOut.size > 0 && (
            <strong className="text-ink">
              {leaveOut.size === 1 ? 'One row stays' : `${formatCount(leaveOut.size)} rows stay`}{' '}
              out by your choice.{' '}
            </strong>
          )}
          All rows enter in one step, with one entry each in the audit trail. Every subject gets a
          random code; the word that the file uses is not kept.
        </p>
        <p className="mt-1">
          Afterwards the file and what was read of it are removed. Which line became which code
          stays for download, for the key file of your site.
        </p>
      </div>
      <ReasonField label="Reason" reasons={REASONS} />
    </Form>
  )
}
