import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { sessionPage, sessionQuery } from '#shared/schemas/session.ts'
import { listSessions } from './sessions.reads.ts'
import { toSession } from './sessions.view.ts'

export const sessionRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/sessions',
    action: 'session.list',
    params: z.object({ studyId: id }),
    query: sessionQuery,
    of: ({ studyId }) => ({ studyId }),
    returns: sessionPage,
    handle: async ({ allowed, query }) => {
      const page = await listSessions(reader(), allowed, query)
      return { ...page, items: page.items.map(toSession) }
    },
  }),
]
