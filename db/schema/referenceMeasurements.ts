import { double, index, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core'
import { recordColumns, uuid } from './columns.ts'

/** A number from the reference analyser for a session's analyte, in the analyte's unit. Class: reference. */
export const referenceMeasurements = mysqlTable(
  'reference_measurements',
  {
    ...recordColumns,
    siteId: uuid('site_id').notNull(),
    sessionId: uuid('session_id').notNull(),
    analyteId: uuid('analyte_id').notNull(),
    value: double('value').notNull(),
  },
  (t) => [
    uniqueIndex('reference_measurements_analyte').on(t.sessionId, t.analyteId),
    index('reference_measurements_study').on(t.studyId, t.analyteId),
  ],
)
