import { index, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { instant, sha256, uuid } from './columns.ts'

/** A fresh authentication, good for one signature of one purpose within minutes. */
export const signingGrants = mysqlTable(
  'signing_grants',
  {
    id: uuid('id').primaryKey(),
    personId: uuid('person_id').notNull(),
    loginIdHash: sha256('login_id_hash').notNull(),
    /** `action:recordId`, for which the person went to sign in again. */
    purpose: varchar('purpose', { length: 120 }).notNull(),
    authenticatedAt: instant('authenticated_at').notNull(),
    endsAt: instant('ends_at').notNull(),
    usedAt: instant('used_at'),
  },
  (t) => [index('signing_grants_login').on(t.loginIdHash, t.purpose)],
)
