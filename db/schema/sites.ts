import { int, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { recordColumns } from './columns.ts'

export const sites = mysqlTable(
  'sites',
  {
    ...recordColumns,
    /** Prefix of the site's subject codes, such as N04. */
    prefix: varchar('prefix', { length: 4 }).notNull(),
    name: varchar('name', { length: 120 }).notNull(),
    plannedSubjects: int('planned_subjects'),
  },
  (t) => [uniqueIndex('sites_prefix').on(t.studyId, t.prefix)],
)
