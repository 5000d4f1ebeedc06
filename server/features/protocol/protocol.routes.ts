import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { protocolAmendment, protocolVersion } from '#shared/schemas/protocol.ts'
import { currentProtocol, listProtocolVersions } from './protocol.reads.ts'
import { amendProtocol } from './protocol.service.ts'
import { toProtocolVersion } from './protocol.view.ts'

const params = z.object({ studyId: id })

export const protocolRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/protocol',
    action: 'protocol.read',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: protocolVersion,
    handle: async ({ params }) =>
      toProtocolVersion(await currentProtocol(reader(), params.studyId)),
  }),
  route({
    method: 'get',
    path: '/api/studies/:studyId/protocol/versions',
    action: 'protocol.read',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(protocolVersion),
    handle: async ({ params }) =>
      (await listProtocolVersions(reader(), params.studyId)).map(toProtocolVersion),
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/protocol',
    status: 201,
    action: 'protocol.amend',
    params,
    body: protocolAmendment,
    of: ({ studyId }) => ({ studyId }),
    returns: protocolVersion,
    handle: async ({ actor, params, body }) =>
      toProtocolVersion(await amendProtocol(actor, params.studyId, body)),
  }),
]
