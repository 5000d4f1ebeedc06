import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import {
  dataset,
  datasetGroups,
  datasetPairs,
  datasetSummary,
  datasetValues,
} from '#shared/schemas/dataset.ts'
import type { SessionRule } from '#shared/terms/analysis.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

/** The datasets of a study, the newest first. */
export const datasetsQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'datasets'],
    queryFn: ({ signal }) =>
      request(z.array(datasetSummary), 'get', `/api/studies/${studyId}/datasets`, { signal }),
  })

/** What is frozen never changes, so it is asked for once. */
const FROZEN = { staleTime: Number.POSITIVE_INFINITY }

export const datasetQuery = (datasetId: string) =>
  queryOptions({
    ...FROZEN,
    queryKey: ['datasets', datasetId],
    queryFn: ({ signal }) => request(dataset, 'get', `/api/datasets/${datasetId}`, { signal }),
  })

/** What the subjects of a dataset can be divided by. */
export const datasetGroupsQuery = (datasetId: string) =>
  queryOptions({
    ...FROZEN,
    queryKey: ['datasets', datasetId, 'groups'],
    queryFn: ({ signal }) =>
      request(datasetGroups, 'get', `/api/datasets/${datasetId}/groups`, { signal }),
  })

type Wanted = { analyteKey: string; sessionRule: SessionRule }

/** Sensor values of one analyte by reference outcome. */
export const datasetValuesQuery = (datasetId: string, wanted: Wanted) =>
  queryOptions({
    ...FROZEN,
    queryKey: ['datasets', datasetId, 'values', wanted],
    queryFn: ({ signal }) =>
      request(datasetValues, 'get', `/api/datasets/${datasetId}/values`, { query: wanted, signal }),
  })

/** Sensor and reference analyser value of one analyte, pair by pair. */
export const datasetPairsQuery = (datasetId: string, wanted: Wanted & { referenceKey?: string }) =>
  queryOptions({
    ...FROZEN,
    queryKey: ['datasets', datasetId, 'pairs', wanted],
    queryFn: ({ signal }) =>
      request(datasetPairs, 'get', `/api/datasets/${datasetId}/pairs`, { query: wanted, signal }),
  })
