import { useState } from 'react'
import { z } from 'zod'
import { words } from '#shared/schemas/common.ts'
import { Form } from '../../forms/Form.tsx'
import { TextAreaField } from '../../forms/TextAreaField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { useRequestLock } from './locks.api.ts'

const requestNote = z.object({ note: words(500).optional() })

/** Asks for the lock; somebody else approves it. */
export function RequestLockDialog(props: { studyId: string; open: boolean; onClose: () => void }) {
  const { studyId, open, onClose } = props
  const ask = useRequestLock(studyId)
  // One key for one opening, so that a second press cannot ask twice.
  const [id] = useState(() => crypto.randomUUID())
  return (
    <Dialog open={open} title="Ask for the final lock" onClose={onClose}>
      <p className="mb-4">
        A monitor looks at the checklist, and approves and signs the lock or sends it back. Until
        then the data can still be changed.
      </p>
      <Form
        schema={requestNote}
        defaultValues={{}}
        submitLabel="Ask for the lock"
        busyLabel="Asking…"
        guard={false}
        onSubmit={({ note }) => ask.mutateAsync({ id, note })}
        onSaved={onClose}
        onCancel={onClose}
      >
        <TextAreaField
          name="note"
          label="Note to the monitor"
          hint="Write nothing that identifies a person."
          rows={3}
          optional
        />
      </Form>
    </Dialog>
  )
}
