import { type Cell, FlexRender, type Row, type RowData } from '@tanstack/react-table'
import { classes } from './classes.ts'
import type { DataTableFeatures } from './dataTableFeatures.ts'

/** A browser forgets that something is a row once `display: block` folds it: the role says it again. */
const ROW_ROLE = { role: 'row' }

type TableRowProps<Data extends RowData> = {
  row: Row<DataTableFeatures, Data>
  /** Given where rows can be chosen. */
  nameOf?: (row: Data) => string
}

/** A row; on a phone a block of labels and values. */
export function TableRow<Data extends RowData>({ row, nameOf }: TableRowProps<Data>) {
  const cells = row.getAllCells()
  return (
    <tr
      {...ROW_ROLE}
      className="max-tablet:block max-tablet:border-b max-tablet:border-rule max-tablet:py-2.5 max-tablet:last:border-b-0 [&:last-child>*]:border-b-0"
    >
      {nameOf && (
        <td className={CELL}>
          <input
            type="checkbox"
            checked={row.getIsSelected()}
            onClick={row.getToggleSelectedHandler()}
            onChange={() => undefined}
            aria-label={`Choose ${nameOf(row.original)}`}
            className="tick block"
          />
        </td>
      )}
      {cells.map((cell, index) => (
        <TableCell key={cell.id} cell={cell} isHeader={index === 0} />
      ))}
    </tr>
  )
}

const CELL =
  'border-b border-rule px-2.5 py-2 text-left font-normal align-top max-tablet:border-b-0 max-tablet:px-0 max-tablet:py-1'

function TableCell<Data extends RowData>({
  cell,
  isHeader,
}: {
  cell: Cell<DataTableFeatures, Data, unknown>
  isHeader: boolean
}) {
  const { meta, header } = cell.column.columnDef
  const Part = isHeader ? 'th' : 'td'
  const labelled = !meta?.hideHeader
  return (
    <Part
      {...(isHeader ? { scope: 'row', role: 'rowheader' } : { role: 'cell' })}
      data-label={labelled && typeof header === 'string' ? header : undefined}
      className={classes(
        CELL,
        meta?.numeric && 'text-right whitespace-nowrap tablet:pr-6 tablet:last:pr-2.5',
        meta?.mono && 'font-mono text-[14px] leading-[22.5px]',
        'max-tablet:grid max-tablet:grid-cols-[minmax(7em,2fr)_3fr] max-tablet:items-baseline max-tablet:gap-x-4 max-tablet:text-left',
        labelled
          ? 'max-tablet:before:whitespace-normal max-tablet:before:font-sans max-tablet:before:text-sm max-tablet:before:text-ink-2 max-tablet:before:content-[attr(data-label)]'
          : 'max-tablet:block',
      )}
    >
      <div className="min-w-0">
        <FlexRender cell={cell} />
      </div>
    </Part>
  )
}
