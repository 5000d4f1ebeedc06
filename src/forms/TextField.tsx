import { useFormContext } from 'react-hook-form'
import { classes } from '../ui/classes.ts'
import { readText } from './blank.ts'
import { FIELD_WIDTHS, FieldFrame, type FieldProps, type FieldWidth } from './FieldFrame.tsx'

type TextFieldProps = FieldProps & {
  type?: 'text' | 'email' | 'url' | 'tel'
  width?: FieldWidth
  /** For codes and hashes. */
  mono?: boolean
  autoComplete?: string
}

/** One line of text; blank is no text where the field is optional. */
export function TextField(props: TextFieldProps) {
  const { name, optional = false, disabled, type = 'text', width = 'medium', mono = false } = props
  const { register } = useFormContext()
  return (
    <FieldFrame {...props}>
      {(control) => (
        <input
          {...control}
          {...register(name, { setValueAs: optional ? readText(optional) : undefined })}
          type={type}
          disabled={disabled}
          autoComplete={props.autoComplete ?? 'off'}
          spellCheck={mono ? false : undefined}
          className={classes('control', FIELD_WIDTHS[width], mono && 'font-mono')}
        />
      )}
    </FieldFrame>
  )
}
