import { queryOptions } from '@tanstack/react-query'
import { sessionPage } from '#shared/schemas/session.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

type Narrowed = Readonly<Record<string, string | undefined>>

/** A page of sessions with the sensor's values. */
export const sessionsQuery = (studyId: string, query: Narrowed) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'sessions', query],
    queryFn: ({ signal }) =>
      request(sessionPage, 'get', `/api/studies/${studyId}/sessions`, { query, signal }),
    // While the next page loads, the rows before stay; another study's never do.
    placeholderData: (rows, from) => (from?.queryKey[1] === studyId ? rows : undefined),
  })
