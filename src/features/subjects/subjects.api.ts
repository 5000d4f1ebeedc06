import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import {
  type SubjectCorrection,
  type SubjectInput,
  subject,
  subjectPage,
} from '#shared/schemas/subject.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

type Narrowed = Readonly<Record<string, string | undefined>>

/** A page of subjects; the table's order "-enrolledAt" becomes the route's. */
export const subjectsQuery = (studyId: string, { sort, ...narrowed }: Narrowed) => {
  const query = {
    ...narrowed,
    order: sort?.replace(/^-/, ''),
    descending: sort?.startsWith('-') ? 'true' : undefined,
  }
  return queryOptions({
    queryKey: [...studyKey(studyId), 'subjects', query],
    queryFn: ({ signal }) =>
      request(subjectPage, 'get', `/api/studies/${studyId}/subjects`, { query, signal }),
    // While the next page loads, the rows before stay; another study's never do.
    placeholderData: (rows, from) => (from?.queryKey[1] === studyId ? rows : undefined),
  })
}

export const subjectQuery = (studyId: string, subjectId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'subject', subjectId],
    queryFn: ({ signal }) => request(subject, 'get', `/api/subjects/${subjectId}`, { signal }),
  })

export function useEnrolSubject(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: ({ siteId, body }: { siteId: string; body: SubjectInput }) =>
      request(subject, 'post', `/api/sites/${siteId}/subjects`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export function useCorrectSubject(studyId: string, subjectId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: SubjectCorrection) =>
      request(subject, 'patch', `/api/subjects/${subjectId}`, { body }),
    // After a refusal too: the reader has to see what stands there now.
    onSettled: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
