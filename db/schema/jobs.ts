import { boolean, index, int, json, mysqlEnum, mysqlTable, varchar } from 'drizzle-orm/mysql-core'
import { JOB_KINDS, JOB_STATES } from '#shared/terms/job.ts'
import { instant, uuid } from './columns.ts'

/** Work off the request thread. A worker holds a job for a while and says how far it is. */
export const jobs = mysqlTable(
  'jobs',
  {
    id: uuid('id').primaryKey(),
    studyId: uuid('study_id').notNull(),
    kind: mysqlEnum('kind', JOB_KINDS).notNull(),
    state: mysqlEnum('state', JOB_STATES).notNull(),
    /** What the job is about (an import, a report). */
    recordId: uuid('record_id').notNull(),
    payload: json('payload').$type<Record<string, unknown>>().notNull(),
    startedBy: uuid('started_by').notNull(),
    queuedAt: instant('queued_at').notNull(),
    attempts: int('attempts').notNull().default(0),
    /** Until then the worker is taken to be alive; later another may take the job over. */
    heldUntil: instant('held_until'),
    progressDone: int('progress_done').notNull().default(0),
    progressTotal: int('progress_total').notNull().default(0),
    progressWords: varchar('progress_words', { length: 120 }),
    cancelRequested: boolean('cancel_requested').notNull().default(false),
    finishedAt: instant('finished_at'),
    failure: varchar('failure', { length: 500 }),
  },
  (t) => [index('jobs_state').on(t.state, t.queuedAt), index('jobs_record').on(t.recordId)],
)
