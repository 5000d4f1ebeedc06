import {
  columnHeading,
  type FigureTable,
  type FigureTableValue,
} from '#shared/figures/figureTable.ts'

/**
 * A figure's numbers in full precision as CSV. What must travel with them (caution, dataset,
 * standing) stands above the heading in lines that begin with #.
 */
export function figureCsv(table: FigureTable, provenance: readonly string[]): string {
  const lines = [
    ...[table.caption, ...provenance].map((line) => `# ${line.replaceAll('\n', ' ')}`),
    table.columns.map((column) => quoted(columnHeading(column))).join(','),
    ...table.rows.map((row) =>
      table.columns.map((column) => quoted(row[column.key] ?? null)).join(','),
    ),
  ]
  return `${lines.join('\r\n')}\r\n`
}

function quoted(value: FigureTableValue): string {
  if (value === null) return ''
  const text = String(value)
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}
