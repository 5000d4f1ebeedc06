import { useFormContext } from 'react-hook-form'
import { classes } from '../ui/classes.ts'
import { readText } from './blank.ts'
import { FIELD_WIDTHS, FieldFrame, type FieldProps, type FieldWidth } from './FieldFrame.tsx'

type SelectFieldProps = FieldProps & {
  options: readonly { value: string; label: string }[]
  /** Shown while nothing is chosen. */
  placeholder?: string
  width?: FieldWidth
}

/** One of many; nothing chosen is undefined. */
export function SelectField(props: SelectFieldProps) {
  const { name, disabled, options, placeholder = 'Choose', width = 'medium' } = props
  const { register } = useFormContext()
  return (
    <FieldFrame {...props}>
      {(control) => (
        <select
          {...control}
          {...register(name, { setValueAs: readText(props.optional) })}
          disabled={disabled}
          className={classes('control', FIELD_WIDTHS[width])}
        >
          <option value="">{placeholder}</option>
          {options.map((option) => (
            <option key={option.value} value={option.value}>
              {option.label}
            </option>
          ))}
        </select>
      )}
    </FieldFrame>
  )
}
