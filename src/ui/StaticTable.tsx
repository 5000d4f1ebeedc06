import type { ReactNode } from 'react'
import { classes } from './classes.ts'
import { ScrollBox } from './ScrollBox.tsx'

type StaticTableProps = {
  caption: string
  hideCaption?: boolean
  columns: readonly { header: string; numeric?: boolean }[]
  /** The first cell of a row is its header. */
  rows: readonly { key: string; cells: readonly ReactNode[] }[]
}

/** Close together on a phone, where every pixel of width counts. */
const PADDING = 'px-2.5 max-tablet:px-1.5 max-tablet:first:pl-0 max-tablet:last:pr-0'

/** A small table that needs no sorting, such as a two-by-two table or a list of measures. */
export function StaticTable({ caption, hideCaption = true, columns, rows }: StaticTableProps) {
  return (
    <ScrollBox label={caption} className="overflow-x-auto [&+&]:mt-4">
      <table className="w-full border-collapse">
        <caption className={hideCaption ? 'sr-only' : 'pb-1 text-left font-semibold'}>
          {caption}
        </caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <th
                key={column.header}
                scope="col"
                className={classes(
                  PADDING,
                  'border-b border-rule-2 py-[7px] align-bottom text-sm font-semibold text-ink-2',
                  column.numeric ? 'text-right' : 'text-left',
                )}
              >
                {column.header}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.key} className="border-b border-rule last:border-b-0">
              {columns.map((column, index) => {
                const look = classes(
                  PADDING,
                  'py-2 font-normal max-tablet:text-[14px]',
                  column.numeric ? 'text-right whitespace-nowrap' : 'text-left',
                )
                return index === 0 ? (
                  <th key={column.header} scope="row" className={look}>
                    {row.cells[index]}
                  </th>
                ) : (
                  <td key={column.header} className={look}>
                    {row.cells[index]}
                  </td>
                )
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollBox>
  )
}
