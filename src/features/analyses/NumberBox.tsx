import { useId, useState } from 'react'
import { readNumber } from '../../forms/readNumber.ts'

type NumberBoxProps = {
  label: string
  unit?: string
  value: number | null
  /** Called with every number that can be read and that `refuse` lets pass; null when it is blank. */
  onChange: (value: number | null) => void
  /** A sentence for a number that cannot be used, or null. */
  refuse?: (value: number) => string | null
}

/** A box for one number outside of any form; what cannot be read or used changes nothing. */
export function NumberBox({ label, unit, value, onChange, refuse }: NumberBoxProps) {
  const id = useId()
  const [text, setText] = useState(value === null ? '' : String(value))
  const problem = problemOf(text, refuse)
  const type = (next: string) => {
    setText(next)
    if (problemOf(next, refuse) === null) onChange(readNumber(next).value ?? null)
  }
  return (
    <div>
      <div className="flex flex-wrap items-center gap-x-2.5 gap-y-1">
        <label htmlFor={id} className="text-[14px] font-semibold">
          {label}
        </label>
        <input
          id={id}
          className="control !w-[110px]"
          inputMode="decimal"
          autoComplete="off"
          value={text}
          aria-invalid={problem ? true : undefined}
          aria-describedby={problem ? `${id}-problem` : undefined}
          onChange={(event) => type(event.target.value)}
        />
        {unit}
      </div>
      {problem && (
        <p id={`${id}-problem`} className="mt-1 text-sm font-semibold text-stop">
          {problem}
        </p>
      )}
    </div>
  )
}

function problemOf(text: string, refuse: NumberBoxProps['refuse']): string | null {
  const { value, problem } = readNumber(text)
  if (problem) return problem
  return value === undefined ? null : (refuse?.(value) ?? null)
}
