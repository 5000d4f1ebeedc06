import { useId } from 'react'
import type { TableColumn } from './tableColumn.ts'
import type { TableParams } from './useTableParams.ts'

/** On a phone there is no header row to press: the same orders as one choice. */
export function SortChoice<Row>({
  columns,
  params,
}: {
  columns: readonly TableColumn<Row>[]
  params: TableParams
}) {
  const id = useId()
  const sortable = columns.filter((column) => column.sortable)
  if (sortable.length === 0) return null
  const value = params.sort ? `${params.sort.desc ? '-' : ''}${params.sort.id}` : ''
  const choose = (text: string) => {
    if (text === '') return params.setSort(null)
    params.setSort({ id: text.replace(/^-/, ''), desc: text.startsWith('-') })
  }
  return (
    <div className="mb-3 flex items-center gap-3 tablet:hidden print:hidden">
      <label htmlFor={id} className="flex-none text-sm font-semibold">
        Order
      </label>
      <select
        id={id}
        className="control"
        value={value}
        onChange={(event) => choose(event.target.value)}
      >
        <option value="">As it comes</option>
        {sortable.map((column) => (
          <optgroup key={column.id} label={column.header}>
            <option value={column.id}>{column.header}, ascending</option>
            <option value={`-${column.id}`}>{column.header}, descending</option>
          </optgroup>
        ))}
      </select>
    </div>
  )
}
