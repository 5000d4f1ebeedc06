import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { job } from '#shared/schemas/job.ts'
import { type Report, type ReportRequest, report } from '#shared/schemas/report.ts'
import type { ReportPart } from '#shared/terms/reportState.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

const WHILE_WRITTEN_MS = 1_000

const isBeingWritten = (each: Report) => each.state === 'preparing'

/** The reports of a study, the newest first; asked for again while one is being written. */
export const reportsQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'reports'],
    queryFn: ({ signal }) =>
      request(z.array(report), 'get', `/api/studies/${studyId}/reports`, { signal }),
    refetchInterval: ({ state }) => (state.data?.some(isBeingWritten) ? WHILE_WRITTEN_MS : false),
  })

/** How far the writing is; for whoever asked for it. */
export const reportJobQuery = (jobId: string) =>
  queryOptions({
    queryKey: ['jobs', jobId],
    queryFn: ({ signal }) => request(job, 'get', `/api/jobs/${jobId}`, { signal }),
    refetchInterval: WHILE_WRITTEN_MS,
  })

export const partAddress = (reportId: string, part: ReportPart): string =>
  `/api/reports/${reportId}/${part}.pdf`

export function useIssueReport(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: ReportRequest) =>
      request(report, 'post', `/api/studies/${studyId}/reports`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export function useTryReportAgain(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (reportId: string) => request(report, 'post', `/api/reports/${reportId}/try-again`),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export function useStopWriting(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (jobId: string) => request(job, 'post', `/api/jobs/${jobId}/cancel`),
    onSuccess: () => queries.invalidateQueries({ queryKey: reportsQuery(studyId).queryKey }),
  })
}
