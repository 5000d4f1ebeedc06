import type { ImportRow } from '#shared/schemas/import.ts'
import type { TableColumn } from '../../ui/tableColumn.ts'

export type ProblemLine = ImportRow['problems'][number] & { id: string; line: number }

/** One line for each thing that is wrong. */
export const problemLines = (rows: readonly ImportRow[]): ProblemLine[] =>
  rows.flatMap(({ line, problems }) =>
    problems.map((problem, index) => ({ ...problem, line, id: `${line} ${index}` })),
  )

export const problemColumns: TableColumn<ProblemLine>[] = [
  { id: 'line', header: 'Line', value: (row) => row.line, numeric: true },
  {
    id: 'column',
    header: 'Column',
    value: (row) => row.column,
    cell: (row) =>
      row.column === '' ? <span className="text-ink-2">whole line</span> : row.column,
  },
  {
    id: 'found',
    header: 'What stands there',
    value: (row) => row.found,
    cell: (row) =>
      row.found === null ? (
        <span className="text-ink-2">–</span>
      ) : (
        <span className="font-mono text-[14px] break-all">{row.found}</span>
      ),
  },
  { id: 'reason', header: 'Why the row is refused', value: (row) => row.reason },
]
