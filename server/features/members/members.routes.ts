import { z } from 'zod'
import { reader } from '#db/client.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { member, memberEnd, memberInput, person } from '#shared/schemas/member.ts'
import { listMembers, listPeople } from './members.reads.ts'
import { addMember, endMember } from './members.service.ts'
import { toMember } from './members.view.ts'

const params = z.object({ studyId: id })

export const memberRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/members',
    action: 'member.list',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(member),
    handle: async ({ params }) => (await listMembers(reader(), params.studyId)).map(toMember),
  }),
  route({
    method: 'get',
    path: '/api/studies/:studyId/people',
    action: 'person.list',
    params,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(person),
    handle: () => listPeople(reader()),
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/members',
    status: 201,
    action: 'member.add',
    params,
    body: memberInput,
    of: ({ studyId }) => ({ studyId }),
    returns: member,
    handle: async ({ actor, params, body }) =>
      toMember(await addMember(actor, params.studyId, body)),
  }),
  route({
    method: 'post',
    path: '/api/members/:memberId/end',
    action: 'member.end',
    params: z.object({ memberId: id }),
    body: memberEnd,
    of: ({ memberId }) => ({ memberId }),
    returns: member,
    handle: async ({ actor, params, body }) =>
      toMember(await endMember(actor, params.memberId, body)),
  }),
]
