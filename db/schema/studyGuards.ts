import { mysqlTable } from 'drizzle-orm/mysql-core'
import { instant, uuid } from './columns.ts'

/** Taken in share mode by every write of a study and alone by the lock: nothing slips past it. */
export const studyGuards = mysqlTable('study_guards', {
  studyId: uuid('study_id').primaryKey(),
  lockedAt: instant('locked_at'),
})
