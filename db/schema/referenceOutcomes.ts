import { index, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { OUTCOMES } from '#shared/terms/outcome.ts'
import { recordColumns, uuid } from './columns.ts'

/** Whether the target condition is there, by the reference standard. Class: reference. */
export const referenceOutcomes = mysqlTable(
  'reference_outcomes',
  {
    ...recordColumns,
    siteId: uuid('site_id').notNull(),
    subjectId: uuid('subject_id').notNull(),
    outcome: mysqlEnum('outcome', OUTCOMES).notNull(),
    reason: varchar('reason', { length: 200 }),
  },
  (t) => [
    uniqueIndex('reference_outcomes_subject').on(t.subjectId),
    index('reference_outcomes_study').on(t.studyId, t.outcome),
  ],
)
