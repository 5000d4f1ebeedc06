import { z } from 'zod'
import { reader } from '#db/client.ts'
import { currentProtocol } from '#server/features/protocol/protocol.reads.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import { lock, lockDecision, lockPage, lockRequest } from '#shared/schemas/lock.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { lockChecklist } from './locks.checklist.ts'
import { listLocks, studyStanding } from './locks.reads.ts'
import { approveLock, requestLock, returnLock, withdrawLock } from './locks.service.ts'
import { toLock } from './locks.view.ts'

const ofLock = {
  method: 'post',
  params: z.object({ lockId: id }),
  body: lockDecision,
  of: ({ lockId }: { lockId: string }) => ({ lockId }),
  returns: lock,
} as const

export const lockRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/lock',
    action: 'lock.read',
    params: z.object({ studyId: id }),
    of: ({ studyId }) => ({ studyId }),
    returns: lockPage,
    handle: async ({ params: { studyId } }) => {
      const { lockedAt, auditCount, auditHeadHash } = await studyStanding(reader(), studyId)
      const { document } = await currentProtocol(reader(), studyId)
      return {
        lockedAt: lockedAt?.toISOString() ?? null,
        checklist: await lockChecklist(reader(), studyId),
        auditCount,
        auditHeadHash,
        caution: CAUTIONS[document.regulatoryStatus],
        locks: (await listLocks(reader(), studyId)).map(toLock),
      }
    },
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/locks',
    status: 201,
    action: 'lock.request',
    params: z.object({ studyId: id }),
    body: lockRequest,
    of: ({ studyId }) => ({ studyId }),
    returns: lock,
    handle: async ({ actor, params, body }) =>
      toLock(await requestLock(actor, params.studyId, body)),
  }),
  route({
    ...ofLock,
    path: '/api/locks/:lockId/withdraw',
    action: 'lock.withdraw',
    handle: async ({ actor, params, body }) =>
      toLock(await withdrawLock(actor, params.lockId, body)),
  }),
  route({
    ...ofLock,
    path: '/api/locks/:lockId/return',
    action: 'lock.return',
    handle: async ({ actor, params, body }) => toLock(await returnLock(actor, params.lockId, body)),
  }),
  route({
    ...ofLock,
    path: '/api/locks/:lockId/approve',
    action: 'lock.approve',
    handle: async ({ actor, params, body }) =>
      toLock(await approveLock(actor, params.lockId, body)),
  }),
]
