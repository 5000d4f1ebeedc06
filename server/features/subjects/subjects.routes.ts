import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import {
  subject,
  subjectCorrection,
  subjectInput,
  subjectPage,
  subjectQuery,
} from '#shared/schemas/subject.ts'
import { getSubject, listSubjects } from './subjects.reads.ts'
import { correctSubject, enrolSubject } from './subjects.service.ts'
import { toSubject } from './subjects.view.ts'

export const subjectRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/subjects',
    action: 'subject.list',
    params: z.object({ studyId: id }),
    query: subjectQuery,
    of: ({ studyId }) => ({ studyId }),
    returns: subjectPage,
    handle: async ({ allowed, query }) => {
      const page = await listSubjects(reader(), allowed, query)
      return { ...page, items: page.items.map((row) => toSubject(row, allowed)) }
    },
  }),
  route({
    method: 'get',
    path: '/api/subjects/:subjectId',
    action: 'subject.read',
    params: z.object({ subjectId: id }),
    of: ({ subjectId }) => ({ subjectId }),
    returns: subject,
    handle: async ({ params, allowed }) =>
      toSubject(await getSubject(reader(), params.subjectId), allowed),
  }),
  route({
    method: 'post',
    path: '/api/sites/:siteId/subjects',
    status: 201,
    action: 'subject.enrol',
    params: z.object({ siteId: id }),
    body: subjectInput,
    of: ({ siteId }) => ({ siteId }),
    returns: subject,
    handle: async ({ actor, params, body, allowed }) =>
      toSubject(await enrolSubject(actor, params.siteId, body), allowed),
  }),
  route({
    method: 'patch',
    path: '/api/subjects/:subjectId',
    action: 'subject.correct',
    params: z.object({ subjectId: id }),
    body: subjectCorrection,
    of: ({ subjectId }) => ({ subjectId }),
    returns: subject,
    handle: async ({ actor, params, body, allowed }) =>
      toSubject(await correctSubject(actor, params.subjectId, body), allowed),
  }),
]
