import { int, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core'
import { instant } from './columns.ts'

/** Requests counted per caller and window, shared by all processes. */
export const rateWindows = mysqlTable(
  'rate_windows',
  {
    caller: varchar('caller', { length: 100 }).notNull(),
    windowAt: instant('window_at').notNull(),
    count: int('count').notNull(),
  },
  (t) => [primaryKey({ columns: [t.caller, t.windowAt] })],
)
