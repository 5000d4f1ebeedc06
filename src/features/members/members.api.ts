import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type MemberEnd, type MemberInput, member, person } from '#shared/schemas/member.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

/** The team list with its history. */
export const membersQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'members'],
    queryFn: ({ signal }) =>
      request(z.array(member), 'get', `/api/studies/${studyId}/members`, { signal }),
  })

/** Whom one could add. */
export const peopleQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'people'],
    queryFn: ({ signal }) =>
      request(z.array(person), 'get', `/api/studies/${studyId}/people`, { signal }),
  })

export function useAddMember(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: MemberInput) =>
      request(member, 'post', `/api/studies/${studyId}/members`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export function useEndMember(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: ({ memberId, body }: { memberId: string; body: MemberEnd }) =>
      request(member, 'post', `/api/members/${memberId}/end`, { body }),
    onSettled: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
