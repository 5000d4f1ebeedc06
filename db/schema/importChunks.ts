import { customType, int, mysqlTable, primaryKey } from 'drizzle-orm/mysql-core'
import { uuid } from './columns.ts'

const mediumblob = customType<{ data: Buffer }>({ dataType: () => 'mediumblob' })

/** The uploaded bytes in pieces below the packet limit; removed when the import is entered or discarded. */
export const importChunks = mysqlTable(
  'import_chunks',
  {
    importId: uuid('import_id').notNull(),
    position: int('position').notNull(),
    bytes: mediumblob('bytes').notNull(),
  },
  (t) => [primaryKey({ columns: [t.importId, t.position] })],
)
