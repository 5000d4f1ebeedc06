import { eq, getTableColumns, getTableName, sql } from 'drizzle-orm'
import type { MySqlColumn, MySqlTable } from 'drizzle-orm/mysql-core'
import type { Database, Reader } from '#db/client.ts'
import { datasetRows } from '#db/schema/datasetRows.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { policyRow } from '#shared/policy/permissions.ts'
import { auditedAs, auditedFields } from './audited.ts'
import type { FieldChange, Happening } from './auditTrail.ts'
import type { Change } from './change.ts'
import { canonicalJson } from './hash.ts'
import { insertMany } from './insertMany.ts'
import { PASSING_TABLES, type PassingTable } from './passing.ts'
import type { Allowed } from './targets.ts'

type Row = Record<string, unknown>
/** Every record of a study has a key. */
type RecordTable = MySqlTable & { id: MySqlColumn; studyId: MySqlColumn }

/** Rows of several tables that are one record to a reader, such as a line of a file. */
export type CompoundRecord = {
  recordType: string
  recordId: string
  recordLabel: string
  recordSiteId: string | null
  /** Each row, and what the trail calls it where the table's own name would not tell rows apart. */
  rows: (readonly [table: RecordTable, row: Row, name?: string])[]
}

/** Rows between two words on progress. */
const ROWS_AT_A_TIME = 500

/** What a change may do. Each write notes for the audit trail what it did. */
export class ChangeTx {
  /** One instant for all that this change writes. */
  readonly at = new Date()
  readonly happenings: Happening[] = []
  readonly allowed: Allowed
  readonly #database: Database
  readonly #request: Change

  constructor(database: Database, request: Change, allowed: Allowed) {
    this.#database = database
    this.#request = request
    this.allowed = allowed
  }

  /** To read inside the transaction. */
  get read(): Reader {
    return this.#database
  }

  /** Inserts a record and notes each of its values. */
  async insert<T extends MySqlTable>(table: T, row: T['$inferInsert']): Promise<T['$inferInsert']> {
    await this.#database.insert(table).values(row)
    this.#note(table, row as Row, newValues(table, row as Row))
    return row
  }

  /** Inserts many compound records in few statements; the trail gets one event for each. */
  async insertCompound(
    records: readonly CompoundRecord[],
    progress?: (done: number) => Promise<void>,
  ): Promise<void> {
    for (let from = 0; from < records.length; from += ROWS_AT_A_TIME) {
      const part = records.slice(from, from + ROWS_AT_A_TIME)
      const byTable = new Map<RecordTable, Row[]>()
      for (const { rows } of part)
        for (const [table, row] of rows) {
          const together = byTable.get(table)
          if (together) together.push(row)
          else byTable.set(table, [row])
        }
      for (const [table, rows] of byTable) await insertMany(this.#database, table, rows as never[])
      for (const { rows, ...record } of part)
        this.happenings.push({
          ...record,
          event: this.#event,
          fields: rows.flatMap(([table, row, name = auditedAs(table).record]) =>
            newValues(table, row).map((change) => ({
              ...change,
              field: `${name}.${change.field}`,
            })),
          ),
        })
      await progress?.(from + part.length)
    }
  }

  /**
   * Changes a saved record: locks it, compares, writes only what differs and notes old and new.
   * @param expectedVersion what the person saw; another version is answered with `changed-meanwhile`
   * @returns whether anything changed
   */
  async update<T extends RecordTable & { version: MySqlColumn }>(
    table: T,
    id: string,
    patch: Partial<T['$inferInsert']>,
    expectedVersion?: number,
  ): Promise<boolean> {
    const before = await this.#locked(table, id)
    if (expectedVersion !== undefined && before.version !== expectedVersion)
      throw new AppError('changed-meanwhile', { more: { version: before.version } })
    const changed = Object.entries(patch as Row).filter(
      ([field, value]) => canonicalJson(before[field] ?? null) !== canonicalJson(value ?? null),
    )
    if (changed.length === 0) return false
    const kept = auditedFields(table, Object.fromEntries(changed))
    if (kept.length > 0 && !this.#request.reason)
      throw new AppError('reason-required', {
        fields: { reasonForChange: 'Say why this saved record changes.' },
      })
    await this.#database
      .update(table)
      .set({ ...Object.fromEntries(changed), version: sql`${table.version} + 1` } as never)
      .where(eq(table.id, id))
    this.#note(
      table,
      { ...before, ...(patch as Row) },
      kept.map((field) => ({
        field,
        informationClass: classOf(table, field),
        old: before[field],
        new: (patch as Row)[field],
      })),
    )
    return true
  }

  /** Closes the study's data for good: from the commit on, every write of them is refused. */
  async lockData(): Promise<void> {
    if (policyRow(this.#request.action).guard !== 'exclusive')
      throw new Error('Only an action that holds the guard alone may lock.')
    await this.#database
      .update(studyGuards)
      .set({ lockedAt: this.at })
      .where(eq(studyGuards.studyId, this.allowed.studyId))
  }

  /** Inserts rows that are not records (pieces of files, jobs, mails); the trail does not list them. */
  async put<T extends PassingTable>(table: T, rows: T['$inferInsert'][]): Promise<void> {
    await insertMany(this.#database, requirePassing(table), rows)
  }

  /** Changes and removes rows that are not records. */
  passing() {
    return {
      update: <T extends PassingTable>(table: T) => this.#database.update(requirePassing(table)),
      delete: <T extends PassingTable>(table: T) => this.#database.delete(requirePassing(table)),
    }
  }

  /** Frozen rows of a dataset: the manifest's hash stands for them in the trail. */
  async freeze(rows: (typeof datasetRows.$inferInsert)[]): Promise<void> {
    await insertMany(this.#database, datasetRows, rows)
  }

  /** Notes something that happened without a value changing, such as a download. */
  note(
    happening: Omit<Happening, 'event' | 'fields'> & { event?: string; fields?: FieldChange[] },
  ): void {
    this.happenings.push({ event: this.#event, fields: [], ...happening })
  }

  get #event(): string {
    return policyRow(this.#request.action).records ?? this.#request.action
  }

  #note(table: MySqlTable, row: Row, fields: FieldChange[]): void {
    const audited = auditedAs(table)
    this.happenings.push({
      event: this.#event,
      recordType: audited.record,
      recordId: audited.key?.(row) ?? String(row.id),
      recordLabel: audited.label?.(row) ?? null,
      recordSiteId: (row.siteId as string | null | undefined) ?? this.allowed.siteId,
      fields,
    })
  }

  async #locked(table: RecordTable & { version: MySqlColumn }, id: string): Promise<Row> {
    const rows = await this.#database
      .select(getTableColumns(table))
      .from(table as MySqlTable)
      .where(eq(table.id, id))
      .for('update')
    const row = rows[0] as Row | undefined
    if (!row || (row.studyId ?? row.id) !== this.allowed.studyId) throw new AppError('not-found')
    return row
  }
}

/** A record of a study would slip past the trail here. */
function requirePassing<T extends PassingTable>(table: T): T {
  if (!PASSING_TABLES.includes(table)) throw new Error(`${getTableName(table)} is audited.`)
  return table
}

function newValues(table: MySqlTable, row: Row): FieldChange[] {
  return auditedFields(table, row)
    .filter((field) => row[field] !== null && row[field] !== undefined)
    .map((field) => ({ field, informationClass: classOf(table, field), new: row[field] }))
}

function classOf(table: MySqlTable, field: string) {
  const audited = auditedAs(table)
  return audited.classes?.[field] ?? audited.informationClass
}
