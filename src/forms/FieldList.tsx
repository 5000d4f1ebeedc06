import { type ReactNode, useEffect } from 'react'
import { type FieldError, get, useFormContext } from 'react-hook-form'
import { Button } from '../ui/Button.tsx'
import { LinkButton } from '../ui/LinkButton.tsx'
import { FieldMessage } from './FieldFrame.tsx'
import { EntryName, useFormParts } from './formContext.ts'

type FieldListProps = {
  /** Path of the list in the form's values. */
  name: string
  /** What the list holds, for the summary of errors. */
  label: string
  children: ReactNode
  /** Adds an entry; without it entries come from elsewhere. */
  add?: { label: string; onAdd: () => void }
}

/** A list of entries of several fields each; what is wrong with the list as a whole stands on top of it. */
export function FieldList({ name, label, children, add }: FieldListProps) {
  const { idOf, labels } = useFormParts()
  const { formState } = useFormContext()
  // The form library keeps the error of a list under `root` once the list has entries.
  const ofEntries: FieldError | undefined = get(formState.errors, `${name}.root`)
  const ofAll: FieldError | undefined = get(formState.errors, name)
  const id = idOf(ofEntries ? `${name}.root` : name)
  useEffect(() => {
    for (const path of [name, `${name}.root`]) labels.set(path, label)
    return () => {
      for (const path of [name, `${name}.root`]) labels.delete(path)
    }
  }, [labels, name, label])
  return (
    <fieldset id={id} tabIndex={-1} className="flex min-w-0 flex-col gap-4">
      <legend className="sr-only">{label}</legend>
      <FieldMessage id={id} message={ofEntries?.message ?? ofAll?.message} />
      {children}
      {add && (
        <div>
          <Button kind="quiet" size="small" onClick={add.onAdd}>
            {add.label}
          </Button>
        </div>
      )}
    </fieldset>
  )
}

type FieldListEntryProps = {
  /** What a screen reader calls the entry: "Site 2". */
  label: string
  children: ReactNode
  /** Without it the entry stays. */
  onRemove?: () => void
}

/** One entry of a list, with the way to take it out again. */
export function FieldListEntry({ label, children, onRemove }: FieldListEntryProps) {
  return (
    <fieldset className="relative min-w-0 border-l-2 border-rule py-1 pl-4">
      <legend className="sr-only">{label}</legend>
      <div className="flex flex-col gap-4">
        <EntryName value={label}>{children}</EntryName>
      </div>
      {onRemove && (
        <LinkButton className="mt-2 text-sm" onClick={onRemove}>
          Take out<span className="sr-only"> {label}</span>
        </LinkButton>
      )}
    </fieldset>
  )
}
