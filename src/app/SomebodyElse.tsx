import { useQuery } from '@tanstack/react-query'
import { useEffect } from 'react'
import { meQuery, somebodyElseIn } from '../api/me.ts'
import { Button } from '../ui/Button.tsx'
import { buttonLook } from '../ui/buttonLook.ts'
import { Dialog } from '../ui/Dialog.tsx'

/**
 * Stands over a page that one person opened when another has signed in in this browser: what was
 * typed here must not be saved under another name, nor shown values be read by somebody else.
 */
export function SomebodyElse() {
  const { data, error, refetch, isFetching } = useQuery(meQuery)
  useEffect(() => {
    // The other sign-in was in another window, so it is asked whenever somebody comes back to this one.
    const back = () => void refetch()
    window.addEventListener('focus', back)
    return () => window.removeEventListener('focus', back)
  }, [refetch])
  const now = somebodyElseIn(error)
  const opener = data?.person.name ?? ''
  return (
    <Dialog
      open={now !== null}
      title="Somebody else is signed in now"
      onClose={() => void refetch()}
      actions={
        <>
          <Button
            kind="quiet"
            busy={isFetching && 'One moment…'}
            onClick={() => void refetch()}
          >{`${opener} has signed in again`}</Button>
          <a href="/" className={buttonLook('primary')}>
            Begin anew as {now}
          </a>
        </>
      }
    >
      <p>
        {opener} opened this page, and {now} has signed in in this browser since. Nothing can be
        done on this page under another name.
      </p>
      <p className="mt-2">
        What was entered here is not saved. To keep it, sign out in another window and sign in there
        again as {opener}.
      </p>
    </Dialog>
  )
}
