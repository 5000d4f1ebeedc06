import type { Session } from '#shared/schemas/session.ts'
import type { SessionRow } from './sessions.reads.ts'

/** A session as it goes out. */
export const toSession = (row: SessionRow): Session => ({
  ...row,
  startedAt: row.startedAt?.toISOString() ?? null,
})
