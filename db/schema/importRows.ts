import { int, json, mysqlEnum, mysqlTable, primaryKey, varchar } from 'drizzle-orm/mysql-core'
import type { ImportEntry, ImportProblem } from '#shared/schemas/import.ts'
import { ROW_FATES } from '#shared/terms/importState.ts'
import { uuid } from './columns.ts'

/**
 * The fate of each row as the preview found it; nothing of it is study data until entered. Entering
 * blanks what was read, so that afterwards a line leads to a subject code and to nothing else.
 */
export const importRows = mysqlTable(
  'import_rows',
  {
    importId: uuid('import_id').notNull(),
    /** Line in the file, the header being line 1. */
    line: int('line').notNull(),
    fate: mysqlEnum('fate', ROW_FATES).notNull(),
    entry: json('entry').$type<ImportEntry>(),
    problems: json('problems').$type<ImportProblem[]>().notNull(),
    /** What stood in the cells that are in the way, in the order of the problems; blanked like the entry. */
    found: json('found').$type<(string | null)[]>(),
    /** Given when the row was entered; the entry itself is blanked then. */
    subjectCode: varchar('subject_code', { length: 16 }),
  },
  (t) => [primaryKey({ columns: [t.importId, t.line] })],
)
