import { index, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { instant, sha256, uuid } from './columns.ts'

/** An authorisation request under way: state, nonce and verifier, bound to one browser's cookie. */
export const loginAttempts = mysqlTable(
  'login_attempts',
  {
    idHash: sha256('id_hash').primaryKey(),
    state: varchar('state', { length: 128 }).notNull(),
    nonce: varchar('nonce', { length: 128 }).notNull(),
    codeVerifier: varchar('code_verifier', { length: 128 }).notNull(),
    returnTo: varchar('return_to', { length: 500 }).notNull(),
    startedAt: instant('started_at').notNull(),
    endsAt: instant('ends_at').notNull(),
    /** Set when somebody already signed in authenticates again in order to sign a record. */
    signingPersonId: uuid('signing_person_id'),
    signingPurpose: varchar('signing_purpose', { length: 120 }),
  },
  (t) => [index('login_attempts_ends').on(t.endsAt)],
)
