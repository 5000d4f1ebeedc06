import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type StudyInput, study, studySummary } from '#shared/schemas/study.ts'
import { request } from '../../api/http.ts'

/** The studies in which the reader has a place now. */
export const studiesQuery = queryOptions({
  queryKey: ['studies', 'list'],
  queryFn: ({ signal }) => request(z.array(studySummary), 'get', '/api/studies', { signal }),
})

export function useCreateStudy() {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: StudyInput) => request(study, 'post', '/api/studies', { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studiesQuery.queryKey }),
  })
}
