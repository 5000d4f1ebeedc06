import {
  bigint,
  index,
  json,
  mysqlEnum,
  mysqlTable,
  primaryKey,
  varchar,
} from 'drizzle-orm/mysql-core'
import { INFORMATION_CLASSES } from '#shared/policy/informationClasses.ts'
import { instant, sha256, uuid } from './columns.ts'

/** Digest of one field's old and new value: SHA-256(salt ‖ value), null where there was none. */
export type FieldDigest = { field: string; old: string | null; new: string | null }

/** Append-only. Triggers refuse UPDATE and DELETE, grants refuse the rest. */
export const auditEvents = mysqlTable(
  'audit_events',
  {
    chainId: varchar('chain_id', { length: 36 }).notNull(),
    /** 1, 2, 3 … within the chain. */
    position: bigint('position', { mode: 'number' }).notNull(),
    event: varchar('event', { length: 60 }).notNull(),
    recordType: varchar('record_type', { length: 40 }).notNull(),
    recordId: varchar('record_id', { length: 36 }).notNull(),
    /** What a reader calls the record: a subject code, a file's number. Never a value. */
    recordLabel: varchar('record_label', { length: 120 }),
    recordSiteId: uuid('record_site_id'),
    informationClass: mysqlEnum('information_class', INFORMATION_CLASSES).notNull(),
    personId: uuid('person_id'),
    personName: varchar('person_name', { length: 200 }).notNull(),
    role: varchar('role', { length: 20 }),
    duty: varchar('duty', { length: 20 }),
    siteId: uuid('site_id'),
    reason: varchar('reason', { length: 500 }),
    collectedAt: instant('collected_at'),
    enteredAt: instant('entered_at'),
    receivedAt: instant('received_at').notNull(),
    /** Offset from UTC of the place where it was entered, such as +01:00. */
    localOffset: varchar('local_offset', { length: 6 }),
    requestId: varchar('request_id', { length: 36 }).notNull(),
    digests: json('digests').$type<FieldDigest[]>().notNull(),
    previousHash: sha256('previous_hash').notNull(),
    hash: sha256('hash').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.chainId, t.position] }),
    index('audit_events_record').on(t.chainId, t.recordType, t.recordId),
    index('audit_events_person').on(t.chainId, t.personId, t.position),
    index('audit_events_event').on(t.chainId, t.event, t.position),
  ],
)
