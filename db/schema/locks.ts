import { int, json, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import type { LockCheck } from '#shared/schemas/lock.ts'
import { LOCK_KINDS, LOCK_STATES } from '#shared/terms/lockState.ts'
import { instant, recordColumns, uuid } from './columns.ts'

/** A request to freeze the data, and what became of it. */
export const locks = mysqlTable(
  'locks',
  {
    ...recordColumns,
    number: int('number').notNull(),
    kind: mysqlEnum('kind', LOCK_KINDS).notNull(),
    state: mysqlEnum('state', LOCK_STATES).notNull(),
    requestedBy: uuid('requested_by').notNull(),
    requestedAt: instant('requested_at').notNull(),
    requestNote: varchar('request_note', { length: 500 }),
    decidedBy: uuid('decided_by'),
    decidedAt: instant('decided_at'),
    decisionNote: varchar('decision_note', { length: 500 }),
    /** The checklist as it stood when it was decided. */
    checklist: json('checklist').$type<LockCheck[]>(),
    datasetId: uuid('dataset_id'),
    signatureId: uuid('signature_id'),
  },
  (t) => [uniqueIndex('locks_number').on(t.studyId, t.number)],
)
