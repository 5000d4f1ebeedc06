import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { analyte, analyteInput } from '#shared/schemas/protocol.ts'
import { listAnalytes } from './analytes.reads.ts'
import { addAnalyte } from './analytes.service.ts'

const params = z.object({ studyId: id })

export const analyteRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/analytes',
    action: 'analyte.list',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(analyte),
    handle: ({ params }) => listAnalytes(reader(), params.studyId),
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/analytes',
    status: 201,
    action: 'analyte.add',
    params,
    body: analyteInput,
    of: ({ studyId }) => ({ studyId }),
    returns: analyte,
    handle: ({ actor, params, body }) => addAnalyte(actor, params.studyId, body),
  }),
]
