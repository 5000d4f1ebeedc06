import { queryOptions } from '@tanstack/react-query'
import { createContext, useContext } from 'react'
import type { Membership } from '#shared/policy/people.ts'
import { type Action, policyRow } from '#shared/policy/permissions.ts'
import { permits } from '#shared/policy/permits.ts'
import { type Study, study } from '#shared/schemas/study.ts'
import { request } from './http.ts'

/** Everything that is read of a study has a key that begins like this, so that one call refreshes it all. */
export const studyKey = (studyId: string) => ['studies', studyId] as const

export const studyQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'frame'],
    queryFn: ({ signal }) => request(study, 'get', `/api/studies/${studyId}`, { signal }),
  })

export const StudyContext = createContext<Study | null>(null)

/** The study whose frame stands around this page. */
export function useStudy(): Study {
  const found = useContext(StudyContext)
  if (!found) throw new Error('A page of a study stands outside of its frame')
  return found
}

/** Whether the reader's lines of the team list allow something, by the same table as the server's. */
export function may(
  of: Study,
  action: Action,
  record: { siteId?: string | null; own?: boolean } = {},
): boolean {
  const row = policyRow(action)
  if (of.lockedAt !== null && row.whenLocked === 'refuse') return false
  return (
    permits(action, of.viewer as readonly Membership[], {
      kind: of.kind,
      siteId: record.siteId ?? null,
      released: of.releasedAt !== null,
      own: record.own ?? false,
    }) !== null
  )
}
