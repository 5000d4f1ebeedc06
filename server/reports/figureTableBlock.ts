import { columnHeading, type FigureTable, formatCell } from '#shared/figures/figureTable.ts'
import type { ReportTable } from './reportDocument.ts'

/** The numbers behind a figure as a table of the report, in the words of the screen. */
export function figureTableBlock(table: FigureTable): ReportTable {
  return {
    kind: 'table',
    caption: table.caption,
    columns: table.columns.map((column) => ({
      label: columnHeading(column),
      align: column.format === 'text' ? 'left' : 'right',
    })),
    rows: table.rows.map((row) =>
      table.columns.map((column) => formatCell(column, row[column.key] ?? null)),
    ),
  }
}
