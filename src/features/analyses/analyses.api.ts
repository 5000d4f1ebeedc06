import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import {
  type AnalysisRequest,
  type AnalysisRun,
  analysis,
  analysisRepetition,
  analysisRun,
  analysisSummary,
} from '#shared/schemas/analysis.ts'
import { job } from '#shared/schemas/job.ts'
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

const WHILE_RUNNING_MS = 1_000

export const isUnderWay = ({ state }: AnalysisRun) => state === 'queued' || state === 'running'

/** Analyses under way and those that ended without a result; asked for again while one is under way. */
export const analysisRunsQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'analysis-runs'],
    queryFn: ({ signal }) =>
      request(z.array(analysisRun), 'get', `/api/studies/${studyId}/analysis-runs`, { signal }),
    refetchInterval: ({ state }) => (state.data?.some(isUnderWay) ? WHILE_RUNNING_MS : false),
  })

/** Asks for an analysis that draws at random; it can be read once its run is over. */
export function useAskForRun(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: AnalysisRequest) =>
      request(analysisRun, 'post', `/api/studies/${studyId}/analysis-runs`, { body }),
    onSuccess: (asked) => {
      // Its page must know of it at once, or it would look for a result.
      queries.setQueryData(analysisRunsQuery(studyId).queryKey, (known = []) => [asked, ...known])
      return queries.invalidateQueries({ queryKey: studyKey(studyId) })
    },
  })
}

export function useStopRun(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (jobId: string) => request(job, 'post', `/api/jobs/${jobId}/cancel`),
    onSuccess: () => queries.invalidateQueries({ queryKey: analysisRunsQuery(studyId).queryKey }),
  })
}

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
