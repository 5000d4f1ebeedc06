import { useMutationState, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { useLocation } from 'react-router-dom'
import { useHasUnsavedWork } from '../forms/UnsavedWork.tsx'
import { classes } from '../ui/classes.ts'

/** Whether everything that the person entered has reached the server. */
export function SavedState() {
  useForgetFailuresOnLeaving()
  const unsaved = useHasUnsavedWork()
  const writes = useMutationState({
    filters: { predicate: (mutation) => mutation.meta?.quiet !== true },
    select: ({ state }) => ({
      status: state.status,
      submittedAt: state.submittedAt,
      message: state.error?.message,
    }),
  })
  const latest = writes.reduce<(typeof writes)[number] | null>(
    (last, write) => (last === null || write.submittedAt >= last.submittedAt ? write : last),
    null,
  )
  const saving = writes.some((write) => write.status === 'pending')
  const failed = !saving && latest?.status === 'error'
  return (
    <span role="status" className="flex min-w-0 items-center gap-[7px]">
      <span
        aria-hidden="true"
        className={classes(
          'size-2 flex-none rounded-full',
          failed
            ? 'bg-[var(--failed)]'
            : saving || unsaved
              ? 'bg-[var(--held)]'
              : 'bg-[var(--saved)]',
        )}
      />
      <span className="min-w-0 truncate" title={failed ? latest?.message : undefined}>
        {failed
          ? `Not saved: ${latest?.message}`
          : saving
            ? 'Saving…'
            : unsaved
              ? 'Not saved yet'
              : 'All saved'}
      </span>
    </span>
  )
}

/** Who leaves the page has let go of what could not be saved there. */
function useForgetFailuresOnLeaving(): void {
  const { pathname } = useLocation()
  const queries = useQueryClient()
  // biome-ignore lint/correctness/useExhaustiveDependencies: a new path is the very occasion
  useEffect(() => {
    const cache = queries.getMutationCache()
    for (const write of cache.findAll({ status: 'error' })) cache.remove(write)
  }, [pathname, queries])
}
