import { queryOptions } from '@tanstack/react-query'
import { referencePage } from '#shared/schemas/reference.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

type Narrowed = Readonly<Record<string, string | undefined>>

/** A page of outcomes and values of the reference analyser, by subject. */
export const referenceQuery = (studyId: string, query: Narrowed) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'reference', query],
    queryFn: ({ signal }) =>
      request(referencePage, 'get', `/api/studies/${studyId}/reference`, { query, signal }),
    // While the next page loads, the rows before stay; another study's never do.
    placeholderData: (rows, from) => (from?.queryKey[1] === studyId ? rows : undefined),
  })
