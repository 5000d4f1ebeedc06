import { int, json, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { REPORT_STATES } from '#shared/terms/reportState.ts'
import { instant, recordColumns, uuid } from './columns.ts'

/** An interim report: an open part for all, a closed part for the monitor. */
export const reports = mysqlTable(
  'reports',
  {
    ...recordColumns,
    number: int('number').notNull(),
    state: mysqlEnum('state', REPORT_STATES).notNull(),
    title: varchar('title', { length: 200 }).notNull(),
    datasetId: uuid('dataset_id').notNull(),
    analysisIds: json('analysis_ids').$type<string[]>().notNull(),
    issuedBy: uuid('issued_by').notNull(),
    issuedAt: instant('issued_at').notNull(),
    jobId: uuid('job_id'),
  },
  (t) => [uniqueIndex('reports_number').on(t.studyId, t.number)],
)
