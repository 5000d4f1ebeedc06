import { boolean, double, index, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core'
import { recordColumns, uuid } from './columns.ts'

/** The sensor's value of one analyte for a session, in the analyte's unit. Class: index. */
export const sessionValues = mysqlTable(
  'session_values',
  {
    ...recordColumns,
    siteId: uuid('site_id').notNull(),
    sessionId: uuid('session_id').notNull(),
    analyteId: uuid('analyte_id').notNull(),
    value: double('value').notNull(),
    /** The value lies below the limit of detection and is kept as it was given. */
    belowLod: boolean('below_lod').notNull().default(false),
  },
  (t) => [
    uniqueIndex('session_values_analyte').on(t.sessionId, t.analyteId),
    index('session_values_study').on(t.studyId, t.analyteId),
  ],
)
