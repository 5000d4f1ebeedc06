import type { ReportBlock } from '#server/reports/reportDocument.ts'
import type { ResultTable } from '#shared/analyses/ResultTable.ts'

/** A table of a result with what is to be known about it; a sentence where there is no table. */
export function resultTableBlocks(table: ResultTable | string | null): ReportBlock[] {
  if (table === null) return []
  if (typeof table === 'string') return [{ kind: 'paragraph', text: table, quiet: true }]
  return [
    {
      kind: 'table',
      caption: table.caption,
      columns: table.columns.map(({ header, numeric }) =>
        numeric ? { label: header, align: 'right' as const } : { label: header },
      ),
      rows: table.rows,
    },
    ...table.notes.map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}
