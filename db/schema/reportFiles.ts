import { customType, int, mysqlEnum, mysqlTable, primaryKey } from 'drizzle-orm/mysql-core'
import { REPORT_PARTS } from '#shared/terms/reportState.ts'
import { instant, sha256, uuid } from './columns.ts'

const longblob = customType<{ data: Buffer }>({ dataType: () => 'longblob' })

/** The PDF of one part, never changed after it was stored. */
export const reportFiles = mysqlTable(
  'report_files',
  {
    reportId: uuid('report_id').notNull(),
    part: mysqlEnum('part', REPORT_PARTS).notNull(),
    studyId: uuid('study_id').notNull(),
    pages: int('pages').notNull(),
    sha256: sha256('sha256').notNull(),
    bytes: longblob('bytes').notNull(),
    storedAt: instant('stored_at').notNull(),
  },
  (t) => [primaryKey({ columns: [t.reportId, t.part] })],
)
