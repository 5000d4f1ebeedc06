import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import {
  analysis,
  analysisRepetition,
  analysisRequest,
  analysisRun,
  analysisSummary,
} from '#shared/schemas/analysis.ts'
import { id } from '#shared/schemas/common.ts'
import { getAnalysis, listAnalyses } from './analyses.reads.ts'
import { repeatAnalysis, runAnalysis } from './analyses.service.ts'
import { toAnalysis, toAnalysisSummary } from './analyses.view.ts'
import { askForRun, listRuns } from './analysisRuns.ts'

const ofStudy = {
  path: '/api/studies/:studyId/analyses',
  params: z.object({ studyId: id }),
  of: ({ studyId }: { studyId: string }) => ({ studyId }),
} as const
const ofAnalysis = {
  params: z.object({ analysisId: id }),
  of: ({ analysisId }: { analysisId: string }) => ({ analysisId }),
} as const

const runsOfStudy = { ...ofStudy, path: '/api/studies/:studyId/analysis-runs' } as const

export const analysisRoutes = [
  route({
    ...runsOfStudy,
    method: 'get',
    action: 'analysis.list',
    returns: z.array(analysisRun),
    handle: ({ actor, params }) => listRuns(actor, params.studyId),
  }),
  route({
    ...runsOfStudy,
    method: 'post',
    status: 202,
    action: 'analysis.run',
    body: analysisRequest,
    returns: analysisRun,
    handle: ({ actor, params, body }) => askForRun(actor, params.studyId, body),
  }),
  route({
    ...ofStudy,
    method: 'get',
    action: 'analysis.list',
    returns: z.array(analysisSummary),
    handle: async ({ params }) =>
      (await listAnalyses(reader(), params.studyId)).map(toAnalysisSummary),
  }),
  route({
    ...ofStudy,
    method: 'post',
    status: 201,
    action: 'analysis.run',
    body: analysisRequest,
    returns: analysis,
    handle: async ({ actor, params, body }) =>
      toAnalysis(await runAnalysis(actor, params.studyId, body)),
  }),
  route({
    ...ofAnalysis,
    method: 'get',
    path: '/api/analyses/:analysisId',
    action: 'analysis.read',
    returns: analysis,
    handle: async ({ params }) => toAnalysis(await getAnalysis(reader(), params.analysisId)),
  }),
  route({
    ...ofAnalysis,
    method: 'post',
    path: '/api/analyses/:analysisId/repeat',
    action: 'analysis.repeat',
    returns: analysisRepetition,
    handle: async ({ actor, params }) => repeatAnalysis(actor, params.analysisId),
  }),
]
