import { memo, useMemo, useState } from 'react'
import { columnHeading, type FigureTable, formatCell } from '#shared/figures/figureTable.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Disclosure } from './Disclosure.tsx'
import { figureCsv } from './figureCsv.ts'
import { LinkButton } from './LinkButton.tsx'
import { ScrollBox } from './ScrollBox.tsx'
import { StaticTable } from './StaticTable.tsx'

type FigureNumbersProps = {
  summary: string
  /** Made when somebody looks: a moving cut-off must not wait for it. Keep it stable. */
  table: () => FigureTable
  /** Caution, dataset and standing, for the file. */
  provenance: readonly string[]
  /** Name of the file without its ending. */
  fileName: string
}

/** A page that holds thousands of rows reads badly and scrolls badly; the file has them all. */
const MOST_ROWS = 200

/** The numbers behind a figure, folded away, and all of them as a file. */
export const FigureNumbers = memo(function FigureNumbers(props: FigureNumbersProps) {
  const [open, setOpen] = useState(false)
  return (
    <Disclosure summary={props.summary} onToggle={setOpen}>
      {open && <Numbers {...props} />}
    </Disclosure>
  )
})

function Numbers({ table: make, provenance, fileName }: FigureNumbersProps) {
  const table = useMemo(make, [make])
  const rows = table.rows.slice(0, MOST_ROWS)
  const save = () => {
    const file = new Blob([figureCsv(table, provenance)], { type: 'text/csv;charset=utf-8' })
    const address = URL.createObjectURL(file)
    const link = document.createElement('a')
    link.href = address
    link.download = `${fileName}.csv`
    link.click()
    URL.revokeObjectURL(address)
  }
  return (
    <>
      <p className="mb-2 text-sm text-ink-2">
        {rows.length < table.rows.length &&
          `The first ${formatCount(rows.length)} of ${formatCount(table.rows.length)} rows. `}
        <LinkButton onClick={save}>Save all rows as a CSV file</LinkButton>
      </p>
      <ScrollBox label={`${table.caption}, all rows shown`} className="max-h-96 overflow-auto">
        <StaticTable
          caption={table.caption}
          columns={table.columns.map((column) => ({
            header: columnHeading(column),
            numeric: column.format !== 'text',
          }))}
          rows={rows.map((row, at) => ({
            key: String(at),
            cells: table.columns.map((column) => formatCell(column, row[column.key] ?? null)),
          }))}
        />
      </ScrollBox>
    </>
  )
}
