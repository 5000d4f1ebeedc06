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

type Deciding = { verb: 'withdraw' | 'return'; lock: Lock }

/** What the reader may do about the lock now. */
export function LockActions({ open, checklist, readerId }: LockActionsProps) {
  const study = useStudy()
  const [deciding, setDeciding] = useState<Deciding | null>(null)
  return (
    <>
      {open ? (
        <OpenRequest open={open} checklist={checklist} readerId={readerId} onDecide={setDeciding} />
      ) : (
        <AskForLock />
      )}
      {/* Stays when somebody else was quicker: it then says so and keeps what was typed. */}
      {deciding && (
        <DecideLockDialog studyId={study.id} {...deciding} open onClose={() => setDeciding(null)} />
      )}
    </>
  )
}

function AskForLock() {
  const study = useStudy()
  const [asking, setAsking] = useState(false)
  if (!may(study, 'lock.request') || study.kind !== 'earlierData') return null
  return (
    <>
      <Button onClick={() => setAsking(true)}>Ask for the final lock</Button>
      <RequestLockDialog studyId={study.id} open={asking} onClose={() => setAsking(false)} />
    </>
  )
}

type OpenRequestProps = {
  open: Lock
  checklist: readonly LockCheck[]
  readerId: string | undefined
  onDecide: (deciding: Deciding) => void
}

function OpenRequest({ open, checklist, readerId, onDecide }: OpenRequestProps) {
  const study = useStudy()
  const decides = may(study, 'lock.approve') && open.requestedById !== readerId
  const left = checklist.filter((check) => check.blocking && check.left > 0).length
  return (
    <>
      {may(study, 'lock.withdraw') && (
        <Button kind="quiet" onClick={() => onDecide({ verb: 'withdraw', lock: open })}>
          Withdraw the request
        </Button>
      )}
      {decides && (
        <>
          <Button kind="quiet" onClick={() => onDecide({ verb: 'return', lock: open })}>
            Send back with a reason
          </Button>
          <Button disabled={left > 0} onClick={() => authenticateToSign(study.id, open.id)}>
            {left === 0
              ? 'Approve and sign'
              : `Approve and sign: ${left} ${left === 1 ? 'check' : 'checks'} left`}
          </Button>
        </>
      )}
    </>
  )
}
