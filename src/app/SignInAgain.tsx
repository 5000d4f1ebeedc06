import { useQueryClient } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { meQuery, somebodyElseIn } from '../api/me.ts'
import { onSignedOut } from '../api/signedOut.ts'
import { Button } from '../ui/Button.tsx'
import { buttonLook } from '../ui/buttonLook.ts'
import { Dialog } from '../ui/Dialog.tsx'
import { SIGNED_IN_PATH, signInAddress } from './signIn.ts'

/**
 * Stands over the page when the login has ended. The sign-in opens in a second window, so the page
 * below, with all that was typed, stays as it is.
 */
export function SignInAgain() {
  const queries = useQueryClient()
  const [ended, setEnded] = useState(false)
  const [stillOut, setStillOut] = useState(false)

  useEffect(() => onSignedOut(() => setEnded(true)), [])
  useEffect(() => {
    if (!ended) return
    const back = () => void check()
    window.addEventListener('focus', back)
    return () => window.removeEventListener('focus', back)
  })

  async function check() {
    try {
      await queries.fetchQuery({ ...meQuery, staleTime: 0, retry: false })
      setEnded(false)
      setStillOut(false)
      await queries.invalidateQueries()
    } catch (error) {
      // Another person's sign-in is SomebodyElse's to speak of.
      const isSomebodyElse = somebodyElseIn(error) !== null
      setEnded(!isSomebodyElse)
      setStillOut(!isSomebodyElse)
    }
  }

  return (
    <Dialog
      open={ended}
      title="Please sign in again"
      onClose={() => setEnded(false)}
      actions={
        <>
          <Button kind="quiet" onClick={() => void check()}>
            I have signed in
          </Button>
          <a
            href={signInAddress(SIGNED_IN_PATH)}
            target="_blank"
            rel="noopener opener"
            className={buttonLook('primary')}
          >
            Sign in again
            <span className="sr-only"> in a new window</span>
          </a>
        </>
      }
    >
      <p>
        Your login has ended, by time or by signing out elsewhere. Sign in again in a new window and
        come back here. What you entered on this page stays, and is not saved yet.
      </p>
      <p role="status" className="mt-2 font-semibold text-stop">
        {stillOut && 'You are not signed in yet.'}
      </p>
    </Dialog>
  )
}
