import { useFormContext } from 'react-hook-form'
import { FieldHint, FieldMessage, type FieldProps, useFieldState } from './FieldFrame.tsx'

/** Yes or no: the label stands beside the box. */
export function CheckField(props: FieldProps) {
  const { name, label, hint, disabled } = props
  const { register } = useFormContext()
  const { message, control } = useFieldState(props)
  return (
    <div>
      <FieldMessage id={control.id} message={message} />
      <label className="flex min-h-10 items-start gap-3 py-2">
        <input
          {...control}
          {...register(name)}
          type="checkbox"
          disabled={disabled}
          className="tick"
        />
        {label}
      </label>
      <div className="-mt-1 pl-8">
        <FieldHint id={control.id} hint={hint} />
      </div>
    </div>
  )
}
