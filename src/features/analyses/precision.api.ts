import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { analysis, analysisSummary } from '#shared/schemas/analysis.ts'
import { type MeasuredBy, precisionExplored } from '#shared/schemas/precision.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

export type PrecisionWanted = {
  analyteKey: string
  measuredBy: MeasuredBy
  reliabilityWanted: number
  accuracyId: string | null
}

/** Precision computed to look at; what is frozen never changes, so it is asked for once. */
export const precisionQuery = (datasetId: string, wanted: PrecisionWanted) =>
  queryOptions({
    queryKey: ['datasets', datasetId, 'precision', wanted],
    queryFn: ({ signal }) => {
      const { accuracyId, reliabilityWanted, ...rest } = wanted
      const query = {
        ...rest,
        reliabilityWanted: String(reliabilityWanted),
        ...(accuracyId === null ? {} : { accuracyId }),
      }
      return request(precisionExplored, 'get', `/api/datasets/${datasetId}/precision`, {
        query,
        signal,
      })
    },
    staleTime: Number.POSITIVE_INFINITY,
    retry: false,
  })

/** The stored accuracy analyses of an analyte on a dataset, the newest first. */
export const accuracyAnalysesQuery = (studyId: string, datasetId: string, analyteKey: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'analyses', 'accuracy', datasetId, analyteKey],
    queryFn: async ({ signal }) => {
      const path = `/api/studies/${studyId}/analyses`
      const all = await request(z.array(analysisSummary), 'get', path, { signal })
      const accuracy = all.filter(
        (each) => each.kind === 'accuracy' && each.datasetId === datasetId,
      )
      const whole = await Promise.all(
        accuracy.map(({ id }) => request(analysis, 'get', `/api/analyses/${id}`, { signal })),
      )
      return whole.filter(
        ({ parameters }) => parameters.kind === 'accuracy' && parameters.analyteKey === analyteKey,
      )
    },
  })
