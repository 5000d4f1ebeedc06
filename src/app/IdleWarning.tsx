import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { sinceLastAnswerMs } from '../api/lastAnswer.ts'
import { meQuery } from '../api/me.ts'
import { Button } from '../ui/Button.tsx'
import { Dialog } from '../ui/Dialog.tsx'

/** So long before the end a person is told; the server counts in whole minutes, which is one of them. */
const WARN_BEFORE_MS = 3 * 60_000
const LOOK_EVERY_MS = 10_000

/** Says that the login will end for want of work, and keeps it with one press. */
export function IdleWarning() {
  const { data, dataUpdatedAt, refetch, isFetching } = useQuery(meQuery)
  const [near, setNear] = useState(false)
  const idleMs = data ? Date.parse(data.idleExpiresAt) - dataUpdatedAt : Number.POSITIVE_INFINITY

  useEffect(() => {
    const look = () => setNear(sinceLastAnswerMs() > idleMs - WARN_BEFORE_MS)
    const timer = setInterval(look, LOOK_EVERY_MS)
    return () => clearInterval(timer)
  }, [idleMs])

  const stay = async () => {
    await refetch()
    setNear(false)
  }
  return (
    <Dialog
      open={near}
      title="Are you still there?"
      onClose={() => void stay()}
      actions={
        <Button onClick={() => void stay()} busy={isFetching && 'One moment…'}>
          Stay signed in
        </Button>
      }
    >
      <p>
        You will be signed out in about two minutes, since nothing has been done here for a while.
        What you have typed stays on this page.
      </p>
    </Dialog>
  )
}
