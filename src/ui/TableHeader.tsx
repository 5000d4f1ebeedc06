import { FlexRender, type Header, type HeaderGroup, type RowData } from '@tanstack/react-table'
import { useEffect, useRef } from 'react'
import { classes } from './classes.ts'
import type { DataTableFeatures } from './dataTableFeatures.ts'

type SelectAll = { checked: boolean; some: boolean; toggle: () => void }

type TableHeaderProps<Row extends RowData> = {
  group: HeaderGroup<DataTableFeatures, Row>
  /** What the header stays at the top of: the page or the table's own box. */
  sticky: 'page' | 'box'
  selectAll?: SelectAll
}

export function TableHeader<Row extends RowData>({
  group,
  sticky,
  selectAll,
}: TableHeaderProps<Row>) {
  const look = classes(
    'z-10 border-b border-rule-2 bg-sheet px-2.5 py-[7px] align-bottom text-sm font-semibold text-ink-2',
    sticky === 'box' ? 'sticky top-0' : 'wide:sticky wide:top-0',
  )
  return (
    <tr>
      {selectAll && (
        <th scope="col" className={classes(look, 'w-10')}>
          <SelectAllBox {...selectAll} />
        </th>
      )}
      {group.headers.map((header) => (
        <th
          key={header.id}
          scope="col"
          aria-sort={ariaSort(header.column.getIsSorted())}
          className={classes(
            look,
            header.column.columnDef.meta?.numeric ? 'pr-6 text-right last:pr-2.5' : 'text-left',
          )}
        >
          <HeaderContent header={header} />
        </th>
      ))}
    </tr>
  )
}

/** One height for headers with and without a button, so that they share a line. */
const LINE = 'inline-flex min-h-6 items-center align-bottom'

function HeaderContent<Row extends RowData>({
  header,
}: {
  header: Header<DataTableFeatures, Row, unknown>
}) {
  const { column } = header
  if (column.columnDef.meta?.hideHeader) {
    return (
      <span className="sr-only">
        <FlexRender header={header} />
      </span>
    )
  }
  if (!column.getCanSort())
    return (
      <span className={LINE}>
        <FlexRender header={header} />
      </span>
    )
  const sorted = column.getIsSorted()
  return (
    <button
      type="button"
      onClick={column.getToggleSortingHandler()}
      className={classes(LINE, 'group gap-1.5 font-semibold hover:text-spruce')}
    >
      <FlexRender header={header} />
      <svg
        viewBox="0 0 8 12"
        aria-hidden="true"
        className={classes(
          'h-3 w-2 flex-none fill-current',
          sorted === false && 'opacity-40 group-hover:opacity-100',
        )}
      >
        {sorted !== 'desc' && <path d="M4 0 8 5H0z" />}
        {sorted !== 'asc' && <path d="M4 12 8 7H0z" />}
      </svg>
    </button>
  )
}

function ariaSort(sorted: false | 'asc' | 'desc') {
  if (sorted === false) return undefined
  return sorted === 'asc' ? 'ascending' : 'descending'
}

function SelectAllBox({ checked, some, toggle }: SelectAll) {
  const ref = useRef<HTMLInputElement>(null)
  useEffect(() => {
    if (ref.current) ref.current.indeterminate = some && !checked
  }, [some, checked])
  return (
    <input
      ref={ref}
      type="checkbox"
      checked={checked}
      onChange={toggle}
      aria-label="Choose all rows"
      className="tick block"
    />
  )
}
