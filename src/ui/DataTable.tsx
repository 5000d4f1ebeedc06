import { functionalUpdate, type RowData, useTable } from '@tanstack/react-table'
import { type ReactNode, useMemo } from 'react'
import { classes } from './classes.ts'
import { dataTableFeatures, toColumnDef } from './dataTableFeatures.ts'
import { ErrorNotice } from './ErrorNotice.tsx'
import { isRefusedAddress, NotAskedWell } from './NotAskedWell.tsx'
import { NothingFits } from './NothingFits.tsx'
import { ScrollBox } from './ScrollBox.tsx'
import { SkeletonRows } from './SkeletonRows.tsx'
import { SortChoice } from './SortChoice.tsx'
import { TableHeader } from './TableHeader.tsx'
import { TablePager } from './TablePager.tsx'
import { TableRow } from './TableRow.tsx'
import type { TableColumn } from './tableColumn.ts'
import { type TableParams, useLocalTableParams } from './useTableParams.ts'

type DataTableProps<Row extends RowData> = {
  caption: string
  hideCaption?: boolean
  columns: readonly TableColumn<Row>[]
  /** Undefined while loading. Must be stable, as a query's data is. */
  rows: readonly Row[] | undefined
  rowId: (row: Row) => string
  params?: TableParams
  /** `here`: all rows are given, sorted and paged by the browser. `server`: the rows are one page in order. */
  order?: 'here' | 'server'
  /** For `order="here"`: which rows the filters leave. */
  filterHere?: (row: Row, filters: TableParams['filters']) => boolean
  /** For `order="server"`: the answer itself, with the key of the page after this one. */
  page?: { next: string | null; total?: number }
  status?: { isPending: boolean; isFetching: boolean; error: Error | null; refetch: () => unknown }
  filters?: ReactNode
  /** Where there is nothing at all: what to do next. */
  empty: ReactNode
  selection?: {
    selected: ReadonlySet<string>
    onChange: (selected: ReadonlySet<string>) => void
    nameOf: (row: Row) => string
  }
  /** A scrolling box of its own with a fixed header, for very wide tables. */
  scroll?: boolean
}

const NO_ROWS: readonly never[] = []
const ROWS_PER_PAGE = 50
/** Said again for the phone, where `display: block` makes a browser forget them. */
const TABLE_ROLE = { role: 'table' }
const BODY_ROLE = { role: 'rowgroup' }

/** The one table: sorting, filters, pages by key, empty and loading shapes; folds to blocks on a phone. */
export function DataTable<Row extends RowData>(props: DataTableProps<Row>) {
  const { columns, rows, order = 'here', status, selection, scroll = false, filterHere } = props
  const local = useLocalTableParams()
  const params = props.params ?? local
  const { filters } = params
  const here = order === 'here'

  const data = useMemo(
    () => (filterHere && rows ? rows.filter((row) => filterHere(row, filters)) : (rows ?? NO_ROWS)),
    [rows, filterHere, filters],
  )
  const columnDefs = useMemo(() => columns.map(toColumnDef), [columns])
  const table = useTable({
    features: dataTableFeatures,
    columns: columnDefs,
    data,
    getRowId: props.rowId,
    manualSorting: !here,
    enableMultiSort: false,
    enableRowSelection: selection !== undefined,
    state: {
      sorting: params.sort ? [params.sort] : [],
      rowSelection: Object.fromEntries([...(selection?.selected ?? [])].map((id) => [id, true])),
    },
    onSortingChange: (updater) =>
      params.setSort(functionalUpdate(updater, params.sort ? [params.sort] : [])[0] ?? null),
    onRowSelectionChange: (updater) =>
      selection?.onChange(
        new Set(Object.keys(functionalUpdate(updater, table.state.rowSelection))),
      ),
  })

  const sorted = table.getRowModel().rows
  const first = here ? Number(params.after ?? 0) : (params.before ?? 0)
  const shown = here ? sorted.slice(first, first + ROWS_PER_PAGE) : sorted
  const nextHere = first + ROWS_PER_PAGE < sorted.length ? String(first + ROWS_PER_PAGE) : null
  const loading = rows === undefined && !status?.error
  const narrowed = Object.keys(filters).length > 0 || params.after !== null

  return (
    <div className="relative">
      {props.filters !== undefined && (
        <div className="mb-3 flex flex-wrap items-end gap-3 print:hidden">{props.filters}</div>
      )}
      <SortChoice columns={columns} params={params} />
      {status?.error && isRefusedAddress(status.error) && <NotAskedWell params={params} />}
      {status?.error && !isRefusedAddress(status.error) && (
        <ErrorNotice
          what={`"${props.caption}" could not be read`}
          error={status.error}
          onRetry={status.refetch}
        />
      )}
      {(loading || shown.length > 0) && (
        <ScrollBox
          label={props.caption}
          className={scroll ? 'max-h-[70vh] overflow-auto' : 'max-wide:overflow-x-auto'}
        >
          <table
            {...TABLE_ROLE}
            aria-busy={loading || status?.isFetching || undefined}
            className={classes(
              'w-full border-separate border-spacing-0 max-tablet:block',
              status?.isFetching && !loading && 'opacity-60 transition-opacity delay-150',
            )}
          >
            <caption
              className={
                props.hideCaption ? 'sr-only' : 'pb-1 text-left text-sm text-ink-2 max-tablet:block'
              }
            >
              {props.caption}
            </caption>
            <thead className="max-tablet:hidden">
              {table.getHeaderGroups().map((group) => (
                <TableHeader
                  key={group.id}
                  group={group}
                  sticky={scroll ? 'box' : 'page'}
                  selectAll={
                    selection && {
                      checked: table.getIsAllRowsSelected(),
                      some: table.getIsSomeRowsSelected(),
                      toggle: () => table.toggleAllRowsSelected(),
                    }
                  }
                />
              ))}
            </thead>
            <tbody {...BODY_ROLE} className="max-tablet:block">
              {loading ? (
                <SkeletonRows columns={columns.map((column) => column.id)} />
              ) : (
                shown.map((row) => <TableRow key={row.id} row={row} nameOf={selection?.nameOf} />)
              )}
            </tbody>
          </table>
        </ScrollBox>
      )}
      {rows !== undefined &&
        shown.length === 0 &&
        (narrowed ? <NothingFits params={params} /> : props.empty)}
      {shown.length > 0 && (
        <TablePager
          params={params}
          rowsHere={shown.length}
          nextKey={here ? nextHere : (props.page?.next ?? null)}
          total={here ? sorted.length : props.page?.total}
          selected={selection?.selected.size}
        />
      )}
    </div>
  )
}
