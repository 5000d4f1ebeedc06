import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { referencePage, referenceQuery } from '#shared/schemas/reference.ts'
import { listReference } from './reference.reads.ts'

export const referenceRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/reference',
    action: 'reference.list',
    params: z.object({ studyId: id }),
    query: referenceQuery,
    of: ({ studyId }) => ({ studyId }),
    returns: referencePage,
    handle: ({ allowed, query }) => listReference(reader(), allowed, query),
  }),
]
