import { char, datetime, int } from 'drizzle-orm/mysql-core'

/** A UUID made by the client or by newId(). */
export const uuid = (name: string) => char(name, { length: 36 })

/** An instant in UTC to the millisecond. */
export const instant = (name: string) => datetime(name, { mode: 'date', fsp: 3 })

/** SHA-256 in lower-case hexadecimal. */
export const sha256 = (name: string) => char(name, { length: 64 })

/** What every record of a study carries: its key, its study, its version counter. */
export const recordColumns = {
  id: uuid('id').primaryKey(),
  studyId: uuid('study_id').notNull(),
  version: int('version').notNull().default(1),
  createdAt: instant('created_at').notNull(),
}
