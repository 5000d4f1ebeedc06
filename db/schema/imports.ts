import { int, json, mysqlEnum, mysqlTable, uniqueIndex } from 'drizzle-orm/mysql-core'
import type {
  ImportColumn,
  ImportCounts,
  ImportFormat,
  ImportMapping,
} from '#shared/schemas/import.ts'
import { IMPORT_STATES } from '#shared/terms/importState.ts'
import { instant, recordColumns, sha256, uuid } from './columns.ts'

/** A file of earlier data on its way in. Its own name is never kept: people write names there. */
export const imports = mysqlTable(
  'imports',
  {
    ...recordColumns,
    number: int('number').notNull(),
    state: mysqlEnum('state', IMPORT_STATES).notNull(),
    fileHash: sha256('file_hash').notNull(),
    fileBytes: int('file_bytes').notNull(),
    format: json('format').$type<ImportFormat>(),
    columns: json('columns').$type<ImportColumn[]>(),
    mapping: json('mapping').$type<ImportMapping>(),
    counts: json('counts').$type<ImportCounts>(),
    jobId: uuid('job_id'),
    uploadedBy: uuid('uploaded_by').notNull(),
    enteredAt: instant('entered_at'),
  },
  (t) => [uniqueIndex('imports_number').on(t.studyId, t.number)],
)
