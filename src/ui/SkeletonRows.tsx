import { SkeletonBar } from './Skeleton.tsx'

const ROWS = ['first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth']

/** The shape of the rows to come. */
export function SkeletonRows({ columns }: { columns: readonly string[] }) {
  return ROWS.map((row) => (
    <tr key={row} className="max-tablet:block max-tablet:py-2">
      {columns.map((column, place) => (
        <td
          key={column}
          className="border-b border-rule px-2.5 py-3 max-tablet:block max-tablet:border-0 max-tablet:px-0 max-tablet:py-1.5"
        >
          <SkeletonBar className={place === 0 ? 'w-24' : 'w-full max-w-32'} />
        </td>
      ))}
    </tr>
  ))
}
