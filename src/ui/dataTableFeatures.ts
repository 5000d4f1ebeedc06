import {
  type ColumnDef,
  createSortedRowModel,
  metaHelper,
  type RowData,
  rowSelectionFeature,
  rowSortingFeature,
  tableFeatures,
} from '@tanstack/react-table'
import { compareValues, type TableColumn } from './tableColumn.ts'

type ColumnLook = { numeric: boolean; mono: boolean; hideHeader: boolean }

export const dataTableFeatures = tableFeatures({
  rowSortingFeature,
  rowSelectionFeature,
  sortedRowModel: createSortedRowModel(),
  columnMeta: metaHelper<ColumnLook>(),
})

export type DataTableFeatures = typeof dataTableFeatures

export function toColumnDef<Row extends RowData>(
  column: TableColumn<Row>,
): ColumnDef<DataTableFeatures, Row> {
  return {
    id: column.id,
    header: column.header,
    // The table puts undefined last, whichever way it sorts.
    accessorFn: (row) => column.value(row) ?? undefined,
    cell: ({ row: { original } }) => (column.cell ?? plain)(original),
    enableSorting: column.sortable === true,
    sortUndefined: 'last',
    sortDescFirst: false,
    sortFn: (a, b) => compareValues(column.value(a.original), column.value(b.original)),
    meta: {
      numeric: column.numeric === true,
      mono: column.mono === true,
      hideHeader: column.hideHeader === true,
    },
  }

  function plain(row: Row): string | number {
    const value = column.value(row)
    if (value === null || value === undefined || value === '') return '–'
    if (typeof value === 'boolean') return value ? 'yes' : 'no'
    return value
  }
}
