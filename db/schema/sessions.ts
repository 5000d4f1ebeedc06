import { index, int, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core'
import { instant, recordColumns, uuid } from './columns.ts'

/** A breath session of a subject. */
export const sessions = mysqlTable(
  'sessions',
  {
    ...recordColumns,
    siteId: uuid('site_id').notNull(),
    subjectId: uuid('subject_id').notNull(),
    /** 1, 2, 3 … within the subject. */
    number: int('number').notNull(),
    /** Unknown in earlier data. */
    startedAt: instant('started_at'),
  },
  (t) => [
    uniqueIndex('sessions_number').on(t.subjectId, t.number),
    index('sessions_study').on(t.studyId, t.siteId),
  ],
)
