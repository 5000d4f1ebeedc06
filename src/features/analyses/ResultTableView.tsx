import type { ResultTable } from '#shared/analyses/ResultTable.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** A table of a result with what is to be known about it; a sentence where there is no table. */
export function ResultTableView({ table }: { table: ResultTable | string | null }) {
  if (table === null) return null
  if (typeof table === 'string') return <p className="mt-3 text-sm">{table}</p>
  return (
    <div className="min-w-0">
      <StaticTable
        caption={table.caption}
        columns={table.columns}
        rows={table.rows.map((cells) => ({ key: cells[0]!, cells }))}
      />
      <div className="mt-2 space-y-1.5 text-sm text-ink-2">
        {table.notes.map((note) => (
          <p key={note}>{note}</p>
        ))}
      </div>
    </div>
  )
}
