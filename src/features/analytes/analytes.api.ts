import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type AnalyteInput, analyte } from '#shared/schemas/protocol.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

export const analytesQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'analytes'],
    queryFn: ({ signal }) =>
      request(z.array(analyte), 'get', `/api/studies/${studyId}/analytes`, { signal }),
  })

export function useAddAnalyte(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: AnalyteInput) =>
      request(analyte, 'post', `/api/studies/${studyId}/analytes`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
