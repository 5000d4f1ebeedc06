import {
  createContext,
  type ReactNode,
  useCallback,
  useContext,
  useEffect,
  useId,
  useMemo,
  useRef,
  useState,
  useSyncExternalStore,
} from 'react'
import { useBlocker } from 'react-router-dom'
import { Button } from '../ui/Button.tsx'
import { Dialog } from '../ui/Dialog.tsx'
import { HeldWork } from './heldWork.ts'

type Leave = () => Promise<unknown>
type Guard = { work: HeldWork; leaveAfterAsking: (leave: Leave) => void }

const UnsavedWork = createContext<Guard | null>(null)

/** Asks before unsaved work is left behind. Stands once around all pages: a router takes one blocker only. */
export function UnsavedWorkGuard({ children }: { children: ReactNode }) {
  const [work] = useState(() => new HeldWork())
  /** What the person wants to do that ends this page, such as signing out. */
  const [leave, setLeave] = useState<Leave | null>(null)
  const leaving = useRef(false)
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      work.isHeld() && currentLocation.pathname !== nextLocation.pathname,
  )

  useEffect(() => {
    const warn = (event: BeforeUnloadEvent) => {
      if (work.isHeld() && !leaving.current) event.preventDefault()
    }
    window.addEventListener('beforeunload', warn)
    return () => window.removeEventListener('beforeunload', warn)
  }, [work])

  const guard = useMemo<Guard>(() => {
    const go = async (leaveNow: Leave) => {
      leaving.current = true
      // Where leaving fails the page stays, and with it the question.
      await leaveNow().catch(() => {
        leaving.current = false
      })
    }
    return {
      work,
      leaveAfterAsking: (wanted) => {
        if (work.isHeld()) setLeave(() => () => go(wanted))
        else void go(wanted)
      },
    }
  }, [work])

  const stay = () => {
    setLeave(null)
    blocker.reset?.()
  }
  const leaveAnyway = () => {
    void leave?.()
    setLeave(null)
    blocker.proceed?.()
  }
  return (
    <UnsavedWork value={guard}>
      {children}
      <Dialog
        open={blocker.state === 'blocked' || leave !== null}
        title="Leave without saving?"
        onClose={stay}
        actions={
          <>
            <Button kind="quiet" onClick={leaveAnyway}>
              Leave without saving
            </Button>
            <Button onClick={stay}>Stay on this page</Button>
          </>
        }
      >
        <p>What you entered on this page has not been saved. It is lost when you leave.</p>
      </Dialog>
    </UnsavedWork>
  )
}

function useGuard(): Guard {
  const guard = useContext(UnsavedWork)
  if (!guard) throw new Error('Nothing guards unsaved work around this page')
  return guard
}

/**
 * Holds the page while there is unsaved work.
 * @returns lets go at once, for a page that leaves right after saving
 */
export function useUnsavedWork(unsaved: boolean): () => void {
  const id = useId()
  const { work } = useGuard()
  useEffect(() => {
    if (!unsaved) return
    work.hold(id)
    return () => work.letGo(id)
  }, [unsaved, work, id])
  return useCallback(() => work.letGo(id), [work, id])
}

/** Whether something on the page is not saved yet. */
export function useHasUnsavedWork(): boolean {
  const { work } = useGuard()
  return useSyncExternalStore(work.subscribe, work.isHeld)
}

/** Does what ends this page, such as signing out: at once, or after asking where work would be lost. */
export function useLeaveAfterAsking(): (leave: Leave) => void {
  return useGuard().leaveAfterAsking
}
