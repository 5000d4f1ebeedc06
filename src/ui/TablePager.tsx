import { formatCount } from '#shared/terms/numbers.ts'
import { LinkButton } from './LinkButton.tsx'
import type { TableParams } from './useTableParams.ts'

type TablePagerProps = {
  params: TableParams
  rowsHere: number
  nextKey: string | null
  total?: number
  selected?: number
}

export function TablePager({ params, rowsHere, nextKey, total, selected }: TablePagerProps) {
  const { after, before } = params
  return (
    <div className="mt-3.5 flex flex-wrap items-center gap-x-4 gap-y-1 text-sm text-ink-2">
      <span role="status">{rangeText(before, rowsHere, total)}</span>
      {selected !== undefined && <span>{formatCount(selected)} chosen</span>}
      {after !== null && (
        <LinkButton className="print:hidden" onClick={params.goPrevious}>
          {before === null ? 'First page' : 'Previous'}
        </LinkButton>
      )}
      {nextKey !== null && (
        <LinkButton className="print:hidden" onClick={() => params.goNext(nextKey, rowsHere)}>
          Next
        </LinkButton>
      )}
    </div>
  )
}

function rangeText(before: number | null, rowsHere: number, total: number | undefined): string {
  const of = total === undefined ? '' : ` of ${formatCount(total)}`
  if (before === null) return `${formatCount(rowsHere)}${of}`
  if (rowsHere === total) return rowsHere === 1 ? '1 row' : `${formatCount(rowsHere)} rows`
  return `${formatCount(before + 1)}–${formatCount(before + rowsHere)}${of}`
}
