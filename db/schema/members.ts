import { index, mysqlEnum, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { DUTIES, ROLES } from '#shared/policy/people.ts'
import { instant, recordColumns, uuid } from './columns.ts'

/** One line of the team list: a person's role, a duty and where it is carried, dated. Lines end; they are never removed. */
export const members = mysqlTable(
  'members',
  {
    ...recordColumns,
    personId: uuid('person_id').notNull(),
    role: mysqlEnum('role', ROLES).notNull(),
    duty: mysqlEnum('duty', DUTIES as [string, ...string[]]).$type<(typeof DUTIES)[number]>(),
    siteId: uuid('site_id'),
    startsAt: instant('starts_at').notNull(),
    endsAt: instant('ends_at'),
    endReason: varchar('end_reason', { length: 500 }),
  },
  (t) => [index('members_person').on(t.personId, t.studyId), index('members_study').on(t.studyId)],
)
