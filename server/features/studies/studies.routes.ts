import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { study, studyInput, studySummary } from '#shared/schemas/study.ts'
import { listStudies } from './studies.reads.ts'
import { createStudy } from './studies.service.ts'
import { studyFor, toStudySummary } from './studies.view.ts'

export const studyRoutes = [
  route({
    method: 'get',
    path: '/api/studies',
    action: 'study.list',
    returns: z.array(studySummary),
    handle: async ({ actor }) => (await listStudies(reader(), actor.personId)).map(toStudySummary),
  }),
  route({
    method: 'post',
    path: '/api/studies',
    status: 201,
    action: 'study.create',
    body: studyInput,
    returns: study,
    handle: async ({ actor, body }) => studyFor(reader(), body.id, await createStudy(actor, body)),
  }),
  route({
    method: 'get',
    path: '/api/studies/:studyId',
    action: 'study.read',
    params: z.object({ studyId: id }),
    of: ({ studyId }) => ({ studyId }),
    returns: study,
    handle: ({ params, allowed }) => studyFor(reader(), params.studyId, allowed.memberships),
  }),
]
