import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import {
  auditEventPage,
  auditEventQuery,
  chainStretch,
  chainVerdict,
} from '#shared/schemas/auditEvent.ts'
import { id } from '#shared/schemas/common.ts'
import { listAuditEvents } from './auditEvents.reads.ts'
import { toAuditEvent } from './auditEvents.view.ts'
import { verifyChain } from './verifyChain.ts'

const params = z.object({ studyId: id })

export const auditEventRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/audit-events',
    action: 'auditEvent.list',
    params,
    query: auditEventQuery,
    of: ({ studyId }) => ({ studyId }),
    returns: auditEventPage,
    handle: async ({ allowed, query }) => {
      const page = await listAuditEvents(reader(), allowed, query)
      return { ...page, items: page.items.map((row) => toAuditEvent(row, allowed)) }
    },
  }),
  route({
    method: 'get',
    path: '/api/studies/:studyId/audit-events/verify',
    action: 'auditEvent.verify',
    params,
    query: chainStretch,
    of: ({ studyId }) => ({ studyId }),
    returns: chainVerdict,
    handle: ({ params, query }) => verifyChain(reader(), params.studyId, query),
  }),
]
