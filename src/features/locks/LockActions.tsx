import { useState } from 'react'
import type { Lock, LockCheck } from '#shared/schemas/lock.ts'
import { may, useStudy } from '../../api/study.ts'
import { Button } from '../../ui/Button.tsx'
import { DecideLockDialog } from './DecideLockDialog.tsx'
import { RequestLockDialog } from './RequestLockDialog.tsx'
import { authenticateToSign } from './signLock.ts'

type LockActionsProps = {
  /** The request that waits for approval, if there is one. */
  open: Lock | null
  checklist: readonly LockCheck[]
  readerId: string | undefined
}

/** What the reader may do about the lock now. */
export function LockActions({ open, checklist, readerId }: LockActionsProps) {
  const study = useStudy()
  const [dialog, setDialog] = useState<'request' | 'withdraw' | 'return' | null>(null)
  const close = () => setDialog(null)
  if (!open) {
    if (!may(study, 'lock.request') || study.kind !== 'earlierData') return null
    return (
      <>
        <Button onClick={() => setDialog('request')}>Ask for the final lock</Button>
        <RequestLockDialog studyId={study.id} open={dialog === 'request'} onClose={close} />
      </>
    )
  }
  const decides = may(study, 'lock.approve') && open.requestedById !== readerId
  const left = checklist.filter((check) => check.blocking && check.left > 0).length
  return (
    <>
      {may(study, 'lock.withdraw') && (
        <Button kind="quiet" onClick={() => setDialog('withdraw')}>
          Withdraw the request
        </Button>
      )}
      {decides && (
        <>
          <Button kind="quiet" onClick={() => setDialog('return')}>
            Send back with a reason
          </Button>
          <Button disabled={left > 0} onClick={() => authenticateToSign(study.id, open.id)}>
            {left === 0
              ? 'Approve and sign'
              : `Approve and sign: ${left} ${left === 1 ? 'check' : 'checks'} left`}
          </Button>
        </>
      )}
      {dialog !== null && dialog !== 'request' && (
        <DecideLockDialog studyId={study.id} lock={open} verb={dialog} open onClose={close} />
      )}
    </>
  )
}
