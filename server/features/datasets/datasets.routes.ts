import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { accuracyValues } from '#shared/analyses/accuracyValues.ts'
import { agreementPairs } from '#shared/analyses/agreementPairs.ts'
import { groupsOf } from '#shared/analyses/groupsOf.ts'
import { id } from '#shared/schemas/common.ts'
import {
  dataset,
  datasetGroups,
  datasetPairs,
  datasetPairsQuery,
  datasetSummary,
  datasetValues,
  datasetValuesQuery,
} from '#shared/schemas/dataset.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { frozenAnalyte, getDataset, listDatasets, readDatasetRows } from './datasets.reads.ts'
import { toDataset, toDatasetSummary } from './datasets.view.ts'

const ofDataset = {
  action: 'dataset.read',
  params: z.object({ datasetId: id }),
  of: ({ datasetId }: { datasetId: string }) => ({ datasetId }),
} as const

export const datasetRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/datasets',
    action: 'dataset.read',
    params: z.object({ studyId: id }),
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(datasetSummary),
    handle: async ({ params }) =>
      (await listDatasets(reader(), params.studyId)).map(toDatasetSummary),
  }),
  route({
    ...ofDataset,
    method: 'get',
    path: '/api/datasets/:datasetId',
    returns: dataset,
    handle: async ({ params }) => toDataset(await getDataset(reader(), params.datasetId)),
  }),
  route({
    ...ofDataset,
    method: 'get',
    path: '/api/datasets/:datasetId/values',
    query: datasetValuesQuery,
    returns: datasetValues,
    handle: async ({ params, query }) => {
      const { manifest, protocol } = await getDataset(reader(), params.datasetId)
      const { unit } = frozenAnalyte(manifest, query.analyteKey, 'analyteKey')
      const rows = await readDatasetRows(reader(), params.datasetId)
      return {
        ...query,
        unit,
        ...accuracyValues(rows, query.analyteKey, query.sessionRule),
        caution: CAUTIONS[protocol.regulatoryStatus],
      }
    },
  }),
  route({
    ...ofDataset,
    method: 'get',
    path: '/api/datasets/:datasetId/pairs',
    query: datasetPairsQuery,
    returns: datasetPairs,
    handle: async ({ params, query }) => {
      const { manifest, protocol } = await getDataset(reader(), params.datasetId)
      const { analyteKey, sessionRule, referenceKey = analyteKey } = query
      const { unit } = frozenAnalyte(manifest, analyteKey, 'analyteKey')
      const { unit: referenceUnit } = frozenAnalyte(manifest, referenceKey, 'referenceKey')
      const rows = await readDatasetRows(reader(), params.datasetId)
      return {
        analyteKey,
        sessionRule,
        referenceKey,
        unit,
        referenceUnit,
        ...agreementPairs(rows, analyteKey, sessionRule, referenceKey),
        caution: CAUTIONS[protocol.regulatoryStatus],
      }
    },
  }),
  route({
    ...ofDataset,
    method: 'get',
    path: '/api/datasets/:datasetId/groups',
    returns: datasetGroups,
    handle: async ({ params }) => {
      await getDataset(reader(), params.datasetId)
      return groupsOf(await readDatasetRows(reader(), params.datasetId))
    },
  }),
]
