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
