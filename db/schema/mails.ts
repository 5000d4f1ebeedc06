import { index, int, mysqlEnum, mysqlTable, text, varchar } from 'drizzle-orm/mysql-core'
import { instant, uuid } from './columns.ts'

/** The outbox: counts and a link, never data. Sent when the mail server is there. */
export const mails = mysqlTable(
  'mails',
  {
    id: uuid('id').primaryKey(),
    studyId: uuid('study_id'),
    recipient: varchar('recipient', { length: 254 }).notNull(),
    subject: varchar('subject', { length: 200 }).notNull(),
    text: text('text').notNull(),
    state: mysqlEnum('state', ['waiting', 'sent', 'givenUp']).notNull(),
    attempts: int('attempts').notNull().default(0),
    nextAttemptAt: instant('next_attempt_at').notNull(),
    writtenAt: instant('written_at').notNull(),
    sentAt: instant('sent_at'),
    failure: varchar('failure', { length: 300 }),
  },
  (t) => [index('mails_waiting').on(t.state, t.nextAttemptAt)],
)
