import { useId } from 'react'
import { classes } from '../ui/classes.ts'
import type { Entry } from './entries.ts'
import { FieldHint, FieldMessage } from './FieldFrame.tsx'

type EntryFieldProps = {
  entry: Entry
  text: string
  problem: string | undefined
  onText: (text: string) => void
}

/** The box of an entry with its label, unit, hint, and what is wrong with what stands in it. */
export function EntryField({ entry, text, problem, onText }: EntryFieldProps) {
  const id = useId()
  const { label, unit, hint, optional } = entry
  const describedBy = classes(hint && `${id}-hint`, problem && `${id}-error`) || undefined
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        {label}
        {optional && <span className="font-normal text-ink-2"> (optional)</span>}
      </label>
      <FieldHint id={id} hint={hint} />
      <FieldMessage id={id} message={problem} />
      <span className="mt-1.5 flex items-center gap-3">
        <input
          id={id}
          type="text"
          inputMode="decimal"
          autoComplete="off"
          value={text}
          aria-describedby={describedBy}
          aria-invalid={problem ? true : undefined}
          onChange={(event) => onText(event.target.value)}
          className="control max-w-32"
        />
        {unit !== undefined && <span className="text-ink-2">{unit}</span>}
      </span>
    </div>
  )
}
