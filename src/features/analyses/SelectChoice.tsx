import { useId } from 'react'

type SelectChoiceProps<T extends string> = {
  label: string
  hint?: string
  value: T
  options: readonly { value: T; label: string }[]
  onChange: (value: T) => void
}

/** One choice of several outside of any form. */
export function SelectChoice<T extends string>(props: SelectChoiceProps<T>) {
  const { label, hint, value, options, onChange } = props
  const id = useId()
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        {label}
        {hint && <span className="font-normal text-ink-2"> · {hint}</span>}
      </label>
      <select
        id={id}
        className="control mt-1"
        value={value}
        onChange={(event) => {
          const chosen = options.find((option) => option.value === event.target.value)
          if (chosen) onChange(chosen.value)
        }}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </div>
  )
}
