import { bigint, index, int, json, mysqlTable } from 'drizzle-orm/mysql-core'
import type { DatasetManifest } from '#shared/schemas/dataset.ts'
import { instant, recordColumns, sha256, uuid } from './columns.ts'

/** Frozen rows under one hash. Triggers refuse every change. */
export const datasets = mysqlTable(
  'datasets',
  {
    ...recordColumns,
    lockId: uuid('lock_id').notNull(),
    frozenAt: instant('frozen_at').notNull(),
    protocolVersionId: uuid('protocol_version_id').notNull(),
    subjectCount: int('subject_count').notNull(),
    rowCount: int('row_count').notNull(),
    /** SHA-256 of the manifest in canonical form. */
    hash: sha256('hash').notNull(),
    manifest: json('manifest').$type<DatasetManifest>().notNull(),
    auditCount: bigint('audit_count', { mode: 'number' }).notNull(),
    auditHeadHash: sha256('audit_head_hash').notNull(),
  },
  (t) => [index('datasets_study').on(t.studyId, t.frozenAt)],
)
