import { int, json, mysqlTable, primaryKey } from 'drizzle-orm/mysql-core'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { sha256, uuid } from './columns.ts'

/** One frozen breath session of a subject (a subject without one has a row too). Class: linked. */
export const datasetRows = mysqlTable(
  'dataset_rows',
  {
    datasetId: uuid('dataset_id').notNull(),
    position: int('position').notNull(),
    row: json('row').$type<DatasetRow>().notNull(),
    /** SHA-256 of the row in canonical form. */
    hash: sha256('hash').notNull(),
  },
  (t) => [primaryKey({ columns: [t.datasetId, t.position] })],
)
