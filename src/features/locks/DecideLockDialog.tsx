import { type Lock, lockDecision } from '#shared/schemas/lock.ts'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { useDecideLock } from './locks.api.ts'

type DecideLockDialogProps = {
  studyId: string
  lock: Lock
  verb: 'withdraw' | 'return'
  open: boolean
  onClose: () => void
}

const WORDS = {
  withdraw: {
    title: 'Withdraw the request',
    text: 'The request ends. The data stay open, and the lock can be asked for again.',
    submit: 'Withdraw the request',
    reasons: [
      'More data are to come',
      'Something has to be corrected first',
      'Asked for too early',
    ],
  },
  return: {
    title: 'Send the request back',
    text: 'Whoever asked sees your reason. The data stay open, and the lock can be asked for again.',
    submit: 'Send it back',
    reasons: ['A check is still open', 'Data are missing', 'Something has to be explained first'],
  },
} as const

/** Ends a request without a lock, with the reason. */
export function DecideLockDialog({ studyId, lock, verb, open, onClose }: DecideLockDialogProps) {
  const decide = useDecideLock(studyId, lock.id, verb)
  const { title, text, submit, reasons } = WORDS[verb]
  return (
    <Dialog open={open} title={title} onClose={onClose} wide>
      <p className="mb-4">{text}</p>
      <Form
        schema={lockDecision}
        defaultValues={{ reasonForChange: '', version: lock.version }}
        submitLabel={submit}
        guard={false}
        onSubmit={(values) => decide.mutateAsync(values)}
        onSaved={onClose}
        onCancel={onClose}
        cancelLabel="Leave it as it is"
      >
        <ReasonField label="Reason" reasons={reasons} />
      </Form>
    </Dialog>
  )
}
