/** A data cut freezes a copy and the study goes on; the final lock closes the study. */
export const LOCK_KINDS = ['cut', 'final'] as const
export type LockKind = (typeof LOCK_KINDS)[number]
export const LOCK_KIND_LABELS: Record<LockKind, string> = { cut: 'Data cut', final: 'Final lock' }

export const LOCK_STATES = ['requested', 'returned', 'withdrawn', 'approved'] as const
export type LockState = (typeof LOCK_STATES)[number]
export const LOCK_STATE_LABELS: Record<LockState, string> = {
  requested: 'Waiting for approval',
  returned: 'Sent back',
  withdrawn: 'Withdrawn',
  approved: 'Approved',
}

/** What the signature under a final lock means; shown before it is given and stored with it. */
export const LOCK_APPROVAL_MEANING =
  'I approve the final lock: these data are frozen as they stand, and nobody can change them.'

/** Questions that the checklist asks before a lock, in the order in which they are shown. */
export const LOCK_CHECKS = [
  'subjects',
  'imports',
  'sensorValues',
  'outcomes',
  'indeterminateOutcomes',
  'referenceValues',
  'analytes',
  'refusedRows',
] as const
export type LockCheckKey = (typeof LOCK_CHECKS)[number]
