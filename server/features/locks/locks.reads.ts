import { desc, eq, max } from 'drizzle-orm'
import { alias } from 'drizzle-orm/mysql-core'
import type { Reader } from '#db/client.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { datasets } from '#db/schema/datasets.ts'
import { locks } from '#db/schema/locks.ts'
import { people } from '#db/schema/people.ts'
import { signatures } from '#db/schema/signatures.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { AppError } from '#shared/errors/AppError.ts'

const requester = alias(people, 'requester')
const decider = alias(people, 'decider')

const lockRows = (read: Reader) =>
  read
    .select({
      lock: locks,
      requestedByName: requester.name,
      decidedByName: decider.name,
      datasetHash: datasets.hash,
      signature: signatures,
    })
    .from(locks)
    .leftJoin(requester, eq(requester.id, locks.requestedBy))
    .leftJoin(decider, eq(decider.id, locks.decidedBy))
    .leftJoin(datasets, eq(datasets.id, locks.datasetId))
    .leftJoin(signatures, eq(signatures.id, locks.signatureId))
export type LockRow = Awaited<ReturnType<typeof getLock>>

/** One request for a lock, and what became of it. @throws AppError not-found */
export async function getLock(read: Reader, lockId: string) {
  const [row] = await lockRows(read).where(eq(locks.id, lockId))
  if (!row) throw new AppError('not-found')
  return row
}

/** All requests of a study, the newest first. */
export const listLocks = (read: Reader, studyId: string) =>
  lockRows(read).where(eq(locks.studyId, studyId)).orderBy(desc(locks.number))

/** The number that the next request of a study gets. */
export async function nextLockNumber(read: Reader, studyId: string): Promise<number> {
  const [row] = await read
    .select({ last: max(locks.number) })
    .from(locks)
    .where(eq(locks.studyId, studyId))
  return (row?.last ?? 0) + 1
}

/** When the data were locked, and where the audit trail stands. */
export async function studyStanding(read: Reader, studyId: string) {
  const [row] = await read
    .select({
      lockedAt: studyGuards.lockedAt,
      auditCount: auditChains.count,
      auditHeadHash: auditChains.headHash,
    })
    .from(studyGuards)
    .innerJoin(auditChains, eq(auditChains.id, studyGuards.studyId))
    .where(eq(studyGuards.studyId, studyId))
  if (!row) throw new AppError('not-found')
  return row
}
