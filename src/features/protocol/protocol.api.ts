import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type ProtocolAmendment, protocolVersion } from '#shared/schemas/protocol.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

/** All versions, the newest first. */
export const protocolVersionsQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'protocol'],
    queryFn: ({ signal }) =>
      request(z.array(protocolVersion), 'get', `/api/studies/${studyId}/protocol/versions`, {
        signal,
      }),
  })

export function useAmendProtocol(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: ProtocolAmendment) =>
      request(protocolVersion, 'post', `/api/studies/${studyId}/protocol`, { body }),
    onSettled: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
