import { bigint, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { sha256 } from './columns.ts'

/** Head of each study's chain of audit events, and of the installation's own. */
export const auditChains = mysqlTable('audit_chains', {
  /** Study id, or `installation`. */
  id: varchar('id', { length: 36 }).primaryKey(),
  count: bigint('count', { mode: 'number' }).notNull(),
  headHash: sha256('head_hash').notNull(),
})
