import { z } from 'zod'
import { reasonForChange } from '#shared/schemas/common.ts'
import type { DataImport } from '#shared/schemas/import.ts'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { useDiscardImport } from './imports.api.ts'

const REASONS = ['The wrong file', 'The file has to be mended first', 'The rows are not needed']

type DiscardDialogProps = { studyId: string; of: DataImport; open: boolean; onClose: () => void }

/** Takes a file out before anything of it was entered. */
export function DiscardDialog({ studyId, of, open, onClose }: DiscardDialogProps) {
  const discard = useDiscardImport(studyId, of.id)
  return (
    <Dialog open={open} title={`Discard import ${of.number}?`} onClose={onClose} wide>
      <p className="mb-4">
        The file and what was read of it are removed. That there was such a file, and its hash,
        stays on record. Nothing of it is in the study.
      </p>
      <Form
        schema={z.object({ reasonForChange })}
        defaultValues={{ reasonForChange: '' }}
        submitLabel="Discard the file"
        busyLabel="Discarding…"
        kind="danger"
        guard={false}
        onCancel={onClose}
        cancelLabel="Keep it"
        onSubmit={(values) => discard.mutateAsync({ ...values, version: of.version })}
        onSaved={onClose}
      >
        <ReasonField label="Reason" reasons={REASONS} />
      </Form>
    </Dialog>
  )
}
