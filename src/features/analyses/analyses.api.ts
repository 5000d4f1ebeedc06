import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import {
  type AnalysisRequest,
  analysis,
  analysisRepetition,
  analysisSummary,
} from '#shared/schemas/analysis.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

/** The stored analyses of a study, the newest first. */
export const analysesQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'analyses'],
    queryFn: ({ signal }) =>
      request(z.array(analysisSummary), 'get', `/api/studies/${studyId}/analyses`, { signal }),
  })

/** A stored analysis never changes. */
export const analysisQuery = (analysisId: string) =>
  queryOptions({
    queryKey: ['analyses', analysisId],
    queryFn: ({ signal }) => request(analysis, 'get', `/api/analyses/${analysisId}`, { signal }),
    staleTime: Number.POSITIVE_INFINITY,
  })

export function useRunAnalysis(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: AnalysisRequest) =>
      request(analysis, 'post', `/api/studies/${studyId}/analyses`, { body }),
    onSuccess: (stored) => {
      queries.setQueryData(analysisQuery(stored.id).queryKey, stored)
      return queries.invalidateQueries({ queryKey: studyKey(studyId) })
    },
  })
}

/** Runs a stored analysis again; nothing of it changes. */
export function useRepeatAnalysis(analysisId: string) {
  return useMutation({
    mutationFn: () => request(analysisRepetition, 'post', `/api/analyses/${analysisId}/repeat`),
    meta: { quiet: true },
  })
}
