import { type Lock, lockDecision } from '#shared/schemas/lock.ts'
import { LOCK_APPROVAL_MEANING } from '#shared/terms/lockState.ts'
import { formatInstant } from '#shared/terms/numbers.ts'
import { ApiError } from '../../api/ApiError.ts'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { Button } from '../../ui/Button.tsx'
import { Caution } from '../../ui/Caution.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { useDecideLock } from './locks.api.ts'
import { authenticateToSign } from './signLock.ts'

type SignLockDialogProps = {
  studyId: string
  lock: Lock
  signer: string
  open: boolean
  onClose: () => void
  onSigned: () => void
}

const REASONS = ['The checklist is settled', 'The open counts were looked at and may stay']

/** After authenticating again: name, time and meaning, then the signature. */
export function SignLockDialog(props: SignLockDialogProps) {
  const { studyId, lock, signer, open, onClose, onSigned } = props
  const approve = useDecideLock(studyId, lock.id, 'approve')
  const expired = approve.error instanceof ApiError && approve.error.code === 'signature-needed'
  return (
    <Dialog open={open} title="Sign the final lock" onClose={onClose} wide>
      <div className="mb-4">
        <Facts
          layout="rows"
          items={[
            { term: 'Name', value: signer },
            {
              term: 'Time',
              value: `${formatInstant(new Date().toISOString())}; the server takes the moment of signing`,
            },
            { term: 'Meaning', value: LOCK_APPROVAL_MEANING },
            {
              term: 'Bound to',
              value:
                'the hash of the dataset that is frozen with it, and the head of the audit trail',
            },
          ]}
        />
      </div>
      <Form
        schema={lockDecision}
        defaultValues={{ reasonForChange: '', version: lock.version }}
        submitLabel="Sign and lock"
        busyLabel="Freezing the data…"
        guard={false}
        onSubmit={(values) => approve.mutateAsync(values)}
        onSaved={onSigned}
        onCancel={onClose}
        cancelLabel="Not now"
      >
        {expired && (
          <Notice tone="warn" title="Your fresh sign-in has run out">
            <p className="mb-2">It is good for five minutes and one signature.</p>
            <Button size="small" kind="quiet" onClick={() => authenticateToSign(studyId, lock.id)}>
              Sign in again to sign
            </Button>
          </Notice>
        )}
        <ReasonField label="Why it can be locked" reasons={REASONS} />
        <Caution title="This closes the study’s data for good">
          From the signature on, every write of them is refused. It cannot be undone by one person.
        </Caution>
      </Form>
    </Dialog>
  )
}
