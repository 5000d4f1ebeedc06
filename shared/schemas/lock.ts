import { z } from 'zod'
import { LOCK_CHECKS, LOCK_KINDS, LOCK_STATES } from '#shared/terms/lockState.ts'
import { caution, id, instant, reasonForChange, words } from './common.ts'

/** One line of the checklist, computed when it is looked at. */
export const lockCheck = z.object({
  key: z.enum(LOCK_CHECKS),
  label: z.string(),
  /** What still stands in the way, or is worth knowing. */
  left: z.number().int(),
  /** A blocking check must be at 0 before the lock can be approved. */
  blocking: z.boolean(),
  /** How it stands, in a few words. */
  detail: z.string(),
})
export type LockCheck = z.infer<typeof lockCheck>

export const signatureView = z.object({
  printedName: z.string(),
  meaning: z.string(),
  signedAt: instant,
  authenticatedAt: instant,
  recordHash: z.string(),
})

export const lock = z.object({
  id,
  number: z.number().int(),
  kind: z.enum(LOCK_KINDS),
  state: z.enum(LOCK_STATES),
  requestedByName: z.string(),
  requestedById: id,
  requestedAt: instant,
  requestNote: z.string().nullable(),
  decidedByName: z.string().nullable(),
  decidedAt: instant.nullable(),
  decisionNote: z.string().nullable(),
  checklist: z.array(lockCheck),
  datasetId: id.nullable(),
  datasetHash: z.string().nullable(),
  signature: signatureView.nullable(),
  version: z.number().int(),
})
export type Lock = z.infer<typeof lock>

/** The lock page: what stands in the way now, and every request so far, the newest first. */
export const lockPage = z.object({
  lockedAt: instant.nullable(),
  checklist: z.array(lockCheck),
  auditCount: z.number().int(),
  auditHeadHash: z.string(),
  caution,
  locks: z.array(lock),
})
export type LockPage = z.infer<typeof lockPage>

export const lockRequest = z.object({ id, note: words(500).optional() })
export type LockRequest = z.infer<typeof lockRequest>

/** Withdraws, sends back or approves: why, and which version of the request the person saw. */
export const lockDecision = z.object({ reasonForChange, version: z.number().int() })
export type LockDecision = z.infer<typeof lockDecision>
