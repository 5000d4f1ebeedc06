import type { ProtocolVersion } from '#shared/schemas/protocol.ts'
import type { ProtocolRow } from './protocol.reads.ts'

/** A version of the protocol as it goes out. */
export const toProtocolVersion = (row: ProtocolRow): ProtocolVersion => ({
  ...row,
  createdAt: row.createdAt.toISOString(),
  createdByName: row.createdByName ?? 'Somebody no longer known',
})
