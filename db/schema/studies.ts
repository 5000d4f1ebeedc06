import { boolean, int, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { STUDY_KINDS } from '#shared/policy/people.ts'
import { instant, uuid } from './columns.ts'

export const studies = mysqlTable(
  'studies',
  {
    id: uuid('id').primaryKey(),
    /** Short name on every page, such as LARK-2. */
    code: varchar('code', { length: 20 }).notNull(),
    title: varchar('title', { length: 200 }).notNull(),
    kind: mysqlEnum('kind', STUDY_KINDS).notNull(),
    /** Invented data, said on every page. */
    demonstration: boolean('demonstration').notNull().default(false),
    version: int('version').notNull().default(1),
    createdAt: instant('created_at').notNull(),
    createdBy: uuid('created_by').notNull(),
    /** When linked data were released to the whole team; null while blinded. */
    releasedAt: instant('released_at'),
  },
  (t) => [uniqueIndex('studies_code').on(t.code)],
)
