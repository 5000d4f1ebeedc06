import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { locks } from '#db/schema/locks.ts'
import { signatures } from '#db/schema/signatures.ts'
import { spendSigningGrant } from '#server/auth/signing.ts'
import type { Actor } from '#server/changes/actor.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { change } from '#server/changes/change.ts'
import { holdStudy } from '#server/features/studies/studies.reads.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { LockCheck, LockDecision, LockRequest } from '#shared/schemas/lock.ts'
import { LOCK_APPROVAL_MEANING, LOCK_STATE_LABELS } from '#shared/terms/lockState.ts'
import { freezeDataset } from './freezeDataset.ts'
import { lockChecklist } from './locks.checklist.ts'
import { getLock, type LockRow, listLocks, nextLockNumber } from './locks.reads.ts'

/** Asks for the final lock of an earlier-data study; one request at a time. */
export async function requestLock(
  actor: Actor,
  studyId: string,
  { id, note }: LockRequest,
): Promise<LockRow> {
  await change({ actor, action: 'lock.request', of: { studyId } }, async (tx) => {
    if (tx.allowed.kind !== 'earlierData') throw new AppError('wrong-kind-of-study')
    await holdStudy(tx.read, studyId)
    const earlier = await listLocks(tx.read, studyId)
    if (earlier.some(({ lock }) => lock.state === 'requested'))
      throw new AppError('not-in-this-state', { message: 'The lock has been asked for already.' })
    await tx.insert(locks, {
      id,
      studyId,
      createdAt: tx.at,
      number: await nextLockNumber(tx.read, studyId),
      kind: 'final',
      state: 'requested',
      requestedBy: actor.personId,
      requestedAt: tx.at,
      requestNote: note ?? null,
    })
  })
  return getLock(reader(), id)
}

/** Takes a request back before it was decided. */
export async function withdrawLock(
  actor: Actor,
  lockId: string,
  { reasonForChange: reason, version }: LockDecision,
): Promise<LockRow> {
  await change({ actor, action: 'lock.withdraw', of: { lockId }, reason }, async (tx) => {
    requireOpen(await getLock(tx.read, lockId))
    await decide(tx, lockId, { state: 'withdrawn', actor, reason, version })
  })
  return getLock(reader(), lockId)
}

/** Sends a request back to whoever asked, with the reason. */
export async function returnLock(
  actor: Actor,
  lockId: string,
  { reasonForChange: reason, version }: LockDecision,
): Promise<LockRow> {
  await change({ actor, action: 'lock.return', of: { lockId }, reason }, async (tx) => {
    const row = await getLock(tx.read, lockId)
    requireOpen(row)
    requireAnother(row, actor)
    await decide(tx, lockId, { state: 'returned', actor, reason, version })
  })
  return getLock(reader(), lockId)
}

/**
 * Approves and signs: uses up a fresh authentication, freezes the dataset, binds the signature to its
 * hash, and closes the study's data for good. Of two approvals at once the second finds it locked.
 *
 * @throws AppError own-request, not-in-this-state, changed-meanwhile, signature-needed, locked
 */
export async function approveLock(
  actor: Actor,
  lockId: string,
  { reasonForChange: reason, version }: LockDecision,
): Promise<LockRow> {
  // Looked at first as well, so that a refusal does not use up the fresh authentication.
  const before = await getLock(reader(), lockId)
  if (before.lock.version !== version)
    throw new AppError('changed-meanwhile', { more: { version: before.lock.version } })
  requireOpen(before)
  requireAnother(before, actor)
  requireNothingLeft(await lockChecklist(reader(), before.lock.studyId))
  const { authenticatedAt } = await spendSigningGrant(actor, `lock.approve:${lockId}`)

  await change({ actor, action: 'lock.approve', of: { lockId }, reason }, async (tx) => {
    const row = await getLock(tx.read, lockId)
    requireOpen(row)
    requireAnother(row, actor)
    const checklist = await lockChecklist(tx.read, tx.allowed.studyId)
    requireNothingLeft(checklist)
    const { datasetId, hash, auditHeadHash } = await freezeDataset(tx, {
      lockId,
      lockKind: row.lock.kind,
    })
    const signatureId = newId()
    await tx.insert(signatures, {
      id: signatureId,
      studyId: tx.allowed.studyId,
      createdAt: tx.at,
      personId: actor.personId,
      printedName: actor.name,
      meaning: LOCK_APPROVAL_MEANING,
      recordType: 'dataset',
      recordId: datasetId,
      recordHash: hash,
      signedAt: tx.at,
      authenticatedAt,
      auditHeadHash,
    })
    await decide(tx, lockId, {
      state: 'approved',
      actor,
      reason,
      version,
      checklist,
      bound: { datasetId, signatureId },
    })
    await tx.lockData()
  })
  return getLock(reader(), lockId)
}

async function decide(
  tx: ChangeTx,
  lockId: string,
  decision: {
    state: 'withdrawn' | 'returned' | 'approved'
    actor: Actor
    reason: string
    version: number
    /** As it stood when it was decided; counted now where it was not before. */
    checklist?: LockCheck[]
    bound?: { datasetId: string; signatureId: string }
  },
): Promise<void> {
  await tx.update(
    locks,
    lockId,
    {
      state: decision.state,
      decidedBy: decision.actor.personId,
      decidedAt: tx.at,
      decisionNote: decision.reason,
      checklist: decision.checklist ?? (await lockChecklist(tx.read, tx.allowed.studyId)),
      ...decision.bound,
    },
    decision.version,
  )
}

function requireOpen({ lock }: LockRow): void {
  if (lock.state !== 'requested')
    throw new AppError('not-in-this-state', {
      message: `This request is no longer open: ${LOCK_STATE_LABELS[lock.state].toLowerCase()}.`,
    })
}

function requireAnother({ lock }: LockRow, actor: Actor): void {
  if (lock.requestedBy === actor.personId) throw new AppError('own-request')
}

function requireNothingLeft(checklist: readonly LockCheck[]): void {
  const left = checklist.filter((check) => check.blocking && check.left > 0)
  if (left.length > 0)
    throw new AppError('not-in-this-state', {
      message: `The lock cannot be approved yet. Still open: ${left.map((check) => check.label.toLowerCase()).join('; ')}.`,
    })
}
