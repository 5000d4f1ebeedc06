import { useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { meQuery } from '../api/me.ts'
import { Button } from '../ui/Button.tsx'
import { buttonLook } from '../ui/buttonLook.ts'
import { Dialog } from '../ui/Dialog.tsx'

/**
 * Stands over a page that one person opened when another has signed in in this browser: what was
 * typed here must not be saved under another name, nor shown values be read by somebody else.
 */
export function SomebodyElse() {
  const { data, refetch, isFetching } = useQuery(meQuery)
  const [opened, setOpened] = useState(data?.person)
  if (data && !opened) setOpened(data.person)
  useEffect(() => {
    // The other sign-in was in another window, so it is asked whenever somebody comes back to this one.
    const back = () => void refetch()
    window.addEventListener('focus', back)
    return () => window.removeEventListener('focus', back)
  }, [refetch])
  const now = data?.person
  if (!now || !opened || now.id === opened.id) return null
  return (
    <Dialog
      open
      title="Somebody else is signed in now"
      onClose={() => void refetch()}
      actions={
        <>
          <Button
            kind="quiet"
            busy={isFetching && 'One moment…'}
            onClick={() => void refetch()}
          >{`${opened.name} has signed in again`}</Button>
          <a href="/" className={buttonLook('primary')}>
            Begin anew as {now.name}
          </a>
        </>
      }
    >
      <p>
        {opened.name} opened this page, and {now.name} has signed in in this browser since. Nothing
        can be done on this page under another name.
      </p>
      <p className="mt-2">
        To keep what was entered here, {opened.name} signs out and in again in another window.
      </p>
    </Dialog>
  )
}
