import { z } from 'zod'
import { reader } from '#db/client.ts'
import { getDataset } from '#server/features/datasets/datasets.reads.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { precisionExplored, precisionQuery } from '#shared/schemas/precision.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { computeAnalysis, requireAnalytes } from './computeAnalysis.ts'

/** Looking at precision: computed from frozen rows and not stored. */
export const precisionRoutes = [
  route({
    method: 'get',
    path: '/api/datasets/:datasetId/precision',
    action: 'dataset.read',
    params: z.object({ datasetId: id }),
    of: ({ datasetId }) => ({ datasetId }),
    query: precisionQuery,
    returns: precisionExplored,
    handle: async ({ params, query }) => {
      const dataset = await getDataset(reader(), params.datasetId)
      const parameters = {
        kind: 'precision' as const,
        ...query,
        accuracyId: query.accuracyId ?? null,
      }
      requireAnalytes(dataset, parameters)
      const result = await computeAnalysis(reader(), dataset, parameters)
      if (result.kind !== 'precision') throw new Error('Another kind was computed.')
      return { parameters, result, caution: CAUTIONS[dataset.protocol.regulatoryStatus] }
    },
  }),
]
