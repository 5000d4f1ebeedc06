import type { Lock } from '#shared/schemas/lock.ts'
import type { LockRow } from './locks.reads.ts'

/** A request for a lock as it goes out; what stood in the way when it was decided comes with it. */
export function toLock({
  lock,
  requestedByName,
  decidedByName,
  datasetHash,
  signature,
}: LockRow): Lock {
  return {
    ...lock,
    requestedById: lock.requestedBy,
    requestedByName: requestedByName ?? '',
    requestedAt: lock.requestedAt.toISOString(),
    decidedByName,
    decidedAt: lock.decidedAt?.toISOString() ?? null,
    checklist: lock.checklist ?? [],
    datasetHash,
    signature: signature && {
      ...signature,
      signedAt: signature.signedAt.toISOString(),
      authenticatedAt: signature.authenticatedAt.toISOString(),
    },
  }
}
