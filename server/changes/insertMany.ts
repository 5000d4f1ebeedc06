import { getTableColumns, getTableName, sql } from 'drizzle-orm'
import type { MySqlTable } from 'drizzle-orm/mysql-core'
import { escape as literal } from 'mysql2'
import type { Database } from '#db/client.ts'

/** Keeps a statement well below the packet limit, whatever the rows hold. */
const STATEMENT_CHARACTERS = 4_000_000

/**
 * Inserts many rows in few statements, written by the driver's own escaping. Building such statements
 * value by value through the query builder takes several times as long as the database needs for them.
 * @param rows keys are those of the schema; a missing one gets the column's default
 */
export async function insertMany<T extends MySqlTable>(
  database: Pick<Database, 'execute'>,
  table: T,
  rows: readonly T['$inferInsert'][],
): Promise<void> {
  const [first] = rows as Record<string, unknown>[]
  if (!first) return
  const columns = Object.entries(getTableColumns(table)).filter(([key]) =>
    rows.some((row) => (row as Record<string, unknown>)[key] !== undefined),
  )
  const names = columns.map(([, column]) => `\`${column.name}\``).join(',')
  const head = `insert into \`${getTableName(table)}\` (${names}) values `
  let values: string[] = []
  let length = 0
  const flush = async () => {
    if (values.length > 0) await database.execute(sql.raw(head + values.join(',')))
    values = []
    length = 0
  }
  for (const row of rows as Record<string, unknown>[]) {
    const cells = columns.map(([key, column]) => {
      const value = row[key]
      if (value === undefined) return 'default'
      return value === null ? 'null' : literal(column.mapToDriverValue(value) as never)
    })
    const text = `(${cells.join(',')})`
    if (length + text.length > STATEMENT_CHARACTERS) await flush()
    values.push(text)
    length += text.length
  }
  await flush()
}
