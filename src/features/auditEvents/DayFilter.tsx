import { useId } from 'react'
import type { TableParams } from '../../ui/useTableParams.ts'

type DayFilterProps = { params: TableParams; name: string; label: string }

/** The first or the last day of what is shown, in UTC. */
export function DayFilter({ params, name, label }: DayFilterProps) {
  const id = useId()
  return (
    <div className="flex flex-wrap items-center gap-2">
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      <input
        id={id}
        type="date"
        value={params.filters[name] ?? ''}
        onChange={(event) => params.setFilter(name, event.target.value)}
        className="control w-40"
      />
    </div>
  )
}
