import { int, json, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { recordColumns, sha256, uuid } from './columns.ts'

/** The protocol as a whole; an amendment is a new row and the old one stays. */
export const protocolVersions = mysqlTable(
  'protocol_versions',
  {
    ...recordColumns,
    number: int('number').notNull(),
    document: json('document').$type<ProtocolDocument>().notNull(),
    documentHash: sha256('document_hash').notNull(),
    createdBy: uuid('created_by').notNull(),
  },
  (t) => [uniqueIndex('protocol_versions_number').on(t.studyId, t.number)],
)
