import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { type LockDecision, type LockRequest, lock, lockPage } from '#shared/schemas/lock.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

/** What stands in the way of the lock now, and every request so far. */
export const lockPageQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'lock'],
    queryFn: ({ signal }) => request(lockPage, 'get', `/api/studies/${studyId}/lock`, { signal }),
  })

export function useRequestLock(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: LockRequest) =>
      request(lock, 'post', `/api/studies/${studyId}/locks`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export type LockVerb = 'withdraw' | 'return' | 'approve'

/** Decides a request: takes it back, sends it back, or approves and signs it. */
export function useDecideLock(studyId: string, lockId: string, verb: LockVerb) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: LockDecision) =>
      request(lock, 'post', `/api/locks/${lockId}/${verb}`, { body }),
    onSettled: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
