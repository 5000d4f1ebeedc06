import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { site, siteCorrection, siteInput } from '#shared/schemas/site.ts'
import { listSites } from './sites.reads.ts'
import { addSite, correctSite } from './sites.service.ts'

const params = z.object({ studyId: id })

export const siteRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/sites',
    action: 'site.list',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(site),
    handle: ({ params }) => listSites(reader(), params.studyId),
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/sites',
    status: 201,
    action: 'site.add',
    params,
    body: siteInput,
    of: ({ studyId }) => ({ studyId }),
    returns: site,
    handle: ({ actor, params, body }) => addSite(actor, params.studyId, body),
  }),
  route({
    method: 'patch',
    path: '/api/sites/:siteId',
    action: 'site.correct',
    params: z.object({ siteId: id }),
    body: siteCorrection,
    of: ({ siteId }) => ({ siteId }),
    returns: site,
    handle: ({ actor, params, body }) => correctSite(actor, params.siteId, body),
  }),
]
