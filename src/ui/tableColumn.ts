import type { ReactNode } from 'react'

export type TableValue = string | number | boolean | null | undefined

/** One column of a DataTable. Keep the list at module scope or in a memo: it must be stable. */
export type TableColumn<Row> = {
  id: string
  header: string
  /** What the column sorts by, and shows where there is no `cell`. */
  value: (row: Row) => TableValue
  cell?: (row: Row) => ReactNode
  sortable?: boolean
  /** Right-aligned, never broken. */
  numeric?: boolean
  mono?: boolean
  /** For a header that is only an explanation to screen readers, such as that of a column of buttons. */
  hideHeader?: boolean
}

/** Ascending; numbers by size, text as a person would order it ("N2" before "N10"). */
export function compareValues(a: TableValue, b: TableValue): number {
  if (typeof a === 'number' && typeof b === 'number') return a - b
  return String(a).localeCompare(String(b), 'en-GB', { numeric: true })
}
