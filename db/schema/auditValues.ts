import {
  bigint,
  char,
  int,
  mediumtext,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  varchar,
} from 'drizzle-orm/mysql-core'
import { INFORMATION_CLASSES } from '#shared/policy/informationClasses.ts'
import { instant } from './columns.ts'

/** Old and new values beside their event; only the redaction account may blank one. */
export const auditValues = mysqlTable(
  'audit_values',
  {
    chainId: varchar('chain_id', { length: 36 }).notNull(),
    position: bigint('position', { mode: 'number' }).notNull(),
    ordinal: int('ordinal').notNull(),
    field: varchar('field', { length: 80 }).notNull(),
    informationClass: mysqlEnum('information_class', INFORMATION_CLASSES).notNull(),
    oldValue: mediumtext('old_value'),
    oldSalt: char('old_salt', { length: 32 }),
    newValue: mediumtext('new_value'),
    newSalt: char('new_salt', { length: 32 }),
    redactedAt: instant('redacted_at'),
  },
  (t) => [primaryKey({ columns: [t.chainId, t.position, t.ordinal] })],
)
