import { useId } from 'react'

type ChoiceFieldProps = {
  label: string
  value: string
  options: readonly string[]
  onChange: (value: string) => void
}

/** One of the headings of a file, or of the words in a column. */
export function ChoiceField({ label, value, options, onChange }: ChoiceFieldProps) {
  const id = useId()
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        {label}
      </label>
      <select
        id={id}
        className="control mt-1.5"
        value={value}
        onChange={(event) => onChange(event.target.value)}
      >
        {options.map((option) => (
          <option key={option} value={option}>
            {option === '' ? '(blank)' : option}
          </option>
        ))}
      </select>
    </div>
  )
}
