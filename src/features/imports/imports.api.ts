import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import {
  type Delimiter,
  dataImport,
  type ImportDiscardRequest,
  type ImportEnterRequest,
  type ImportPreviewRequest,
  importReading,
  importRowPage,
  importSummary,
} from '#shared/schemas/import.ts'
import { job } from '#shared/schemas/job.ts'
import { request, upload } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

const POLL_MS = 700

const importsKey = (studyId: string) => [...studyKey(studyId), 'imports'] as const

export const importsQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...importsKey(studyId), 'list'],
    queryFn: ({ signal }) =>
      request(z.array(importSummary), 'get', `/api/studies/${studyId}/imports`, { signal }),
  })

/** One import; asked again and again while work on it is under way. */
export const importQuery = (studyId: string, importId: string) =>
  queryOptions({
    queryKey: [...importsKey(studyId), importId, 'import'],
    queryFn: ({ signal }) => request(dataImport, 'get', `/api/imports/${importId}`, { signal }),
    refetchInterval: (query) => (query.state.data?.work ? POLL_MS : false),
  })

/** Headings, samples and suggestions of the file; they do not change as long as it is there. */
export const importReadingQuery = (studyId: string, importId: string, delimiter?: Delimiter) =>
  queryOptions({
    queryKey: [...importsKey(studyId), importId, 'columns', delimiter ?? 'proposed'],
    queryFn: ({ signal }) =>
      request(importReading, 'get', `/api/imports/${importId}/columns`, {
        query: { delimiter },
        signal,
      }),
    staleTime: Number.POSITIVE_INFINITY,
  })

export const importRowsQuery = (
  studyId: string,
  importId: string,
  version: number,
  query: Readonly<Record<string, string | undefined>>,
) =>
  queryOptions({
    queryKey: [...importsKey(studyId), importId, 'rows', version, query],
    queryFn: ({ signal }) =>
      request(importRowPage, 'get', `/api/imports/${importId}/rows`, { query, signal }),
  })

export function useUploadImport(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: ({ file, onProgress }: { file: File; onProgress: (fraction: number) => void }) => {
      const form = new FormData()
      // Under a name of ours: people write names of patients into names of files.
      form.append('file', file, 'file.csv')
      return upload(dataImport, `/api/studies/${studyId}/imports`, form, { onProgress })
    },
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

function useImportWrite<Body>(studyId: string, importId: string, verb: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: Body) =>
      request(dataImport, 'post', `/api/imports/${importId}/${verb}`, { body }),
    onSuccess: (answer) => {
      queries.setQueryData(importQuery(studyId, importId).queryKey, answer)
      return queries.invalidateQueries({ queryKey: importsQuery(studyId).queryKey })
    },
  })
}

export const usePreviewImport = (studyId: string, importId: string) =>
  useImportWrite<ImportPreviewRequest>(studyId, importId, 'preview')

export const useEnterImport = (studyId: string, importId: string) =>
  useImportWrite<ImportEnterRequest>(studyId, importId, 'enter')

export const useDiscardImport = (studyId: string, importId: string) =>
  useImportWrite<ImportDiscardRequest>(studyId, importId, 'discard')

export function useStopWork(studyId: string, importId: string) {
  const queries = useQueryClient()
  return useMutation({
    meta: { quiet: true },
    mutationFn: (jobId: string) => request(job, 'post', `/api/jobs/${jobId}/cancel`),
    onSuccess: () =>
      queries.invalidateQueries({ queryKey: importQuery(studyId, importId).queryKey }),
  })
}
