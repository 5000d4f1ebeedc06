import { useId } from 'react'

type SegmentsProps<Value extends string> = {
  label: string
  hideLabel?: boolean
  options: readonly { value: Value; label: string }[]
  value: Value
  onChange: (value: Value) => void
}

/** One of a few, seen all at once. */
export function Segments<Value extends string>({
  label,
  hideLabel = false,
  options,
  value,
  onChange,
}: SegmentsProps<Value>) {
  const name = useId()
  return (
    <fieldset className="flex flex-wrap items-center gap-x-3 gap-y-1">
      <legend className={hideLabel ? 'sr-only' : 'float-left mr-3 font-semibold'}>{label}</legend>
      <div className="inline-flex flex-wrap rounded border border-rule-2">
        {options.map((option) => (
          <label
            key={option.value}
            className="flex min-h-10 items-center border-r border-rule-2 px-3.5 font-semibold text-spruce first:rounded-l last:rounded-r last:border-r-0 hover:bg-spruce-2 has-checked:bg-spruce has-checked:text-on-spruce has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-spruce"
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChange(option.value)}
              className="sr-only"
            />
            {option.label}
          </label>
        ))}
      </div>
    </fieldset>
  )
}
