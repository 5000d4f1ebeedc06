import { index, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { instant, recordColumns, sha256, uuid } from './columns.ts'

/** Name, time and meaning, bound to the hash of the record as it was when it was signed. */
export const signatures = mysqlTable(
  'signatures',
  {
    ...recordColumns,
    personId: uuid('person_id').notNull(),
    printedName: varchar('printed_name', { length: 200 }).notNull(),
    meaning: varchar('meaning', { length: 200 }).notNull(),
    recordType: varchar('record_type', { length: 40 }).notNull(),
    recordId: uuid('record_id').notNull(),
    recordHash: sha256('record_hash').notNull(),
    signedAt: instant('signed_at').notNull(),
    authenticatedAt: instant('authenticated_at').notNull(),
    auditHeadHash: sha256('audit_head_hash').notNull(),
  },
  (t) => [index('signatures_record').on(t.recordType, t.recordId)],
)
