import { boolean, json, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import type { Role } from '#shared/policy/people.ts'
import { instant, uuid } from './columns.ts'

/** Everybody whom the identity provider has vouched for, keyed by issuer and subject. */
export const people = mysqlTable(
  'people',
  {
    id: uuid('id').primaryKey(),
    issuer: varchar('issuer', { length: 255 }).notNull(),
    subject: varchar('subject', { length: 255 }).notNull(),
    name: varchar('name', { length: 200 }).notNull(),
    email: varchar('email', { length: 254 }),
    roles: json('roles').$type<Role[]>().notNull(),
    disabled: boolean('disabled').notNull().default(false),
    firstSeenAt: instant('first_seen_at').notNull(),
    lastSeenAt: instant('last_seen_at').notNull(),
  },
  (t) => [uniqueIndex('people_issuer_subject').on(t.issuer, t.subject)],
)
