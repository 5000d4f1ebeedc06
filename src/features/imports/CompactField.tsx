import type { ReactNode } from 'react'
import { type ControlProps, FieldMessage, useFieldState } from '../../forms/FieldFrame.tsx'

type CompactFieldProps = {
  name: string
  /** Read out, and named in the error summary; the table's heading shows it to the eye. */
  label: string
  /** Shown where no heading says it. */
  showLabel?: string
  children: (control: ControlProps) => ReactNode
}

/** A field inside a table: its label is for the ear, its error stands under it. */
export function CompactField({ name, label, showLabel, children }: CompactFieldProps) {
  const { message, control } = useFieldState({ name, label })
  return (
    <div className="min-w-0">
      <label htmlFor={control.id} className={showLabel ? 'block text-sm text-ink-2' : 'sr-only'}>
        {showLabel ? (
          <>
            {showLabel}
            <span className="sr-only">, {label}</span>
          </>
        ) : (
          label
        )}
      </label>
      {children(control)}
      <FieldMessage id={control.id} message={message} />
    </div>
  )
}
