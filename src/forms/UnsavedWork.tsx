import {
  createContext,
  type ReactNode,
  useCallback,
  useContext,
  useEffect,
  useId,
  useMemo,
  useRef,
} from 'react'
import { useBlocker } from 'react-router-dom'
import { Button } from '../ui/Button.tsx'
import { Dialog } from '../ui/Dialog.tsx'

type Registry = { hold: (id: string) => void; letGo: (id: string) => void }

const UnsavedWork = createContext<Registry | null>(null)

/** Asks before unsaved work is left behind. Stands once around all pages: a router takes one blocker only. */
export function UnsavedWorkGuard({ children }: { children: ReactNode }) {
  const held = useRef(new Set<string>())
  const registry = useMemo<Registry>(
    () => ({
      hold: (id) => held.current.add(id),
      letGo: (id) => held.current.delete(id),
    }),
    [],
  )
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      held.current.size > 0 && currentLocation.pathname !== nextLocation.pathname,
  )

  useEffect(() => {
    const warn = (event: BeforeUnloadEvent) => {
      if (held.current.size > 0) event.preventDefault()
    }
    window.addEventListener('beforeunload', warn)
    return () => window.removeEventListener('beforeunload', warn)
  }, [])

  return (
    <UnsavedWork value={registry}>
      {children}
      <Dialog
        open={blocker.state === 'blocked'}
        title="Leave without saving?"
        onClose={() => blocker.reset?.()}
        actions={
          <>
            <Button kind="quiet" onClick={() => blocker.proceed?.()}>
              Leave without saving
            </Button>
            <Button onClick={() => blocker.reset?.()}>Stay on this page</Button>
          </>
        }
      >
        <p>What you entered on this page has not been saved. It is lost when you leave.</p>
      </Dialog>
    </UnsavedWork>
  )
}

/**
 * Holds the page while there is unsaved work.
 * @returns lets go at once, for a page that leaves right after saving
 */
export function useUnsavedWork(unsaved: boolean): () => void {
  const id = useId()
  const registry = useContext(UnsavedWork)
  useEffect(() => {
    if (!unsaved) return
    registry?.hold(id)
    return () => registry?.letGo(id)
  }, [unsaved, registry, id])
  return useCallback(() => registry?.letGo(id), [registry, id])
}
