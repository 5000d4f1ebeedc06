import Papa from 'papaparse'

/** A CSV table with its header; cells as text. */
export class Table {
  readonly columns: string[]
  readonly rows: Record<string, string>[]

  constructor(columns: string[], rows: Record<string, string>[]) {
    this.columns = columns
    this.rows = rows
  }

  static parse(csv: string): Table {
    const { data, meta } = Papa.parse<Record<string, string>>(csv.trim(), { header: true })
    return new Table(meta.fields ?? [], data)
  }

  has(column: string): boolean {
    return this.columns.includes(column)
  }

  where(keep: (row: Record<string, string>) => boolean): Table {
    return new Table(this.columns, this.rows.filter(keep))
  }

  texts(column: string): string[] {
    if (!this.has(column)) throw new Error(`The table has no column "${column}".`)
    return this.rows.map((row) => (row[column] ?? '').trim())
  }

  /** Numbers of a column; empty cells and NA are null. */
  numbers(column: string): (number | null)[] {
    return this.texts(column).map((text) =>
      text === '' || text === 'NA' || text === 'NaN' ? null : Number(text),
    )
  }

  /** The reference outcome: column `label`, 1 present, 0 absent, anything else not known. */
  outcomes(): (boolean | null)[] {
    return this.numbers('label').map((label) => (label === 1 ? true : label === 0 ? false : null))
  }
}
