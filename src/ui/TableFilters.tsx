import { useEffect, useId, useState } from 'react'
import { classes } from './classes.ts'
import type { TableParams } from './useTableParams.ts'

/** Long enough to finish a word, short enough not to wait for. */
const TYPING_PAUSE_MS = 300

type FilterProps = { params: TableParams; name: string; label: string }

/** Narrows the table to what is typed, once the typing pauses. */
export function TableSearch({
  params,
  name,
  label,
  width = 'w-44',
}: FilterProps & { width?: string }) {
  const id = useId()
  const inAddress = params.filters[name] ?? ''
  const [text, setText] = useState(inAddress)
  const [known, setKnown] = useState(inAddress)
  if (known !== inAddress) {
    // The address changed from outside: by Back, or by clearing the filters.
    setKnown(inAddress)
    setText(inAddress)
  }
  const { setFilter } = params
  useEffect(() => {
    if (text.trim() === inAddress) return
    const timer = setTimeout(() => setFilter(name, text.trim()), TYPING_PAUSE_MS)
    return () => clearTimeout(timer)
  })
  return (
    <div className="flex flex-wrap items-center gap-2">
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      <input
        id={id}
        type="search"
        autoComplete="off"
        spellCheck={false}
        value={text}
        onChange={(event) => setText(event.target.value)}
        className={classes('control', width)}
      />
    </div>
  )
}

type TableChoiceProps = FilterProps & { options: readonly { value: string; label: string }[] }

/** One of a list, or all. */
export function TableChoice({ params, name, label, options }: TableChoiceProps) {
  const id = useId()
  return (
    <div className="flex flex-wrap items-center gap-2">
      <label htmlFor={id} className="font-semibold">
        {label}
      </label>
      <select
        id={id}
        value={params.filters[name] ?? ''}
        onChange={(event) => params.setFilter(name, event.target.value)}
        className="control w-auto"
      >
        <option value="">All</option>
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </div>
  )
}

/** Narrows to one kind of row by one press; a second press shows all again. */
export function TableToggle({
  params,
  name,
  label,
  value = 'yes',
}: FilterProps & { value?: string }) {
  const pressed = params.filters[name] === value
  return (
    <button
      type="button"
      aria-pressed={pressed}
      onClick={() => params.setFilter(name, pressed ? '' : value)}
      className={classes(
        'min-h-[42px] rounded border px-4 py-2 font-semibold',
        pressed
          ? 'border-spruce bg-spruce text-on-spruce'
          : 'border-rule-2 text-spruce hover:bg-spruce-2',
      )}
    >
      {label}
    </button>
  )
}
