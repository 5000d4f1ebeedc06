import { type ReactNode, useContext, useEffect } from 'react'
import { type FieldError, get, useFormContext } from 'react-hook-form'
import { classes } from '../ui/classes.ts'
import { EntryName, useFormParts } from './formContext.ts'

/** What every field can be given. */
export type FieldProps = {
  /** Path in the form's values: "title" or "analytes.0.unit". */
  name: string
  label: string
  hint?: ReactNode
  /** Not needed; said in words beside the label. Blank is undefined, or null where the schema wants that. */
  optional?: boolean | 'null'
  disabled?: boolean
}

export type ControlProps = {
  id: string
  'aria-describedby': string | undefined
  'aria-invalid': true | undefined
}

type FieldFrameProps = FieldProps & {
  /** Several controls under one name: a fieldset with a legend. */
  group?: boolean
  children: (control: ControlProps) => ReactNode
}

/** Tells the form what the field is called, and the field what is wrong with it. */
export function useFieldState({ name, label, hint }: FieldProps) {
  const { idOf, labels } = useFormParts()
  const entry = useContext(EntryName)
  const { formState } = useFormContext()
  const error: FieldError | undefined = get(formState.errors, name)
  const message = error?.message
  const id = idOf(name)

  useEffect(() => {
    labels.set(name, entry === null ? label : `${entry}, ${label}`)
    return () => {
      labels.delete(name)
    }
  }, [labels, name, label, entry])

  const describedBy =
    classes(hint !== undefined && `${id}-hint`, message && `${id}-error`) || undefined
  const control: ControlProps = {
    id,
    'aria-describedby': describedBy,
    'aria-invalid': message ? true : undefined,
  }
  return { message, control }
}

export function FieldHint({ id, hint }: { id: string; hint: ReactNode }) {
  if (hint === undefined) return null
  return (
    <div id={`${id}-hint`} className="text-sm text-ink-2">
      {hint}
    </div>
  )
}

export function FieldMessage({ id, message }: { id: string; message: string | undefined }) {
  if (!message) return null
  return (
    <p id={`${id}-error`} className="text-sm font-semibold text-stop">
      <span className="sr-only">Error: </span>
      {message}
    </p>
  )
}

/** Label, hint and error around a control, tied to it for everybody. */
export function FieldFrame(props: FieldFrameProps) {
  const { label, hint, optional = false, group = false, children } = props
  const { message, control } = useFieldState(props)
  const { id } = control
  const title = (
    <>
      {label}
      {optional !== false && <span className="font-normal text-ink-2"> (optional)</span>}
    </>
  )
  const inside = (
    <>
      <FieldHint id={id} hint={hint} />
      <FieldMessage id={id} message={message} />
      <div className="mt-1.5">{children(control)}</div>
    </>
  )
  if (group) {
    return (
      <fieldset
        id={id}
        tabIndex={-1}
        aria-describedby={control['aria-describedby']}
        disabled={props.disabled}
        className="min-w-0"
      >
        <legend className="text-[14px] font-semibold">{title}</legend>
        {inside}
      </fieldset>
    )
  }
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        {title}
      </label>
      {inside}
    </div>
  )
}

export type FieldWidth = 'short' | 'medium' | 'full'

export const FIELD_WIDTHS: Record<FieldWidth, string> = {
  short: 'max-w-40',
  medium: 'max-w-md',
  full: '',
}
