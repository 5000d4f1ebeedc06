import { index, mysqlTable, text } from 'drizzle-orm/mysql-core'
import { instant, sha256, uuid } from './columns.ts'

/** A sign-in. The browser holds the secret; here lies its SHA-256 alone. */
export const logins = mysqlTable(
  'logins',
  {
    idHash: sha256('id_hash').primaryKey(),
    personId: uuid('person_id').notNull(),
    startedAt: instant('started_at').notNull(),
    lastSeenAt: instant('last_seen_at').notNull(),
    /** Absolute end, whatever happens in between. */
    endsAt: instant('ends_at').notNull(),
    /** When the provider last saw the person type a secret (`auth_time`). */
    authenticatedAt: instant('authenticated_at').notNull(),
    /** Kept for the provider's sign-out page. */
    idToken: text('id_token'),
  },
  (t) => [index('logins_person').on(t.personId), index('logins_ends').on(t.endsAt)],
)
