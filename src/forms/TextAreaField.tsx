import { useFormContext } from 'react-hook-form'
import { readText } from './blank.ts'
import { FieldFrame, type FieldProps } from './FieldFrame.tsx'

/** Several lines of text; blank is no text where the field is optional. */
export function TextAreaField({ rows = 4, ...props }: FieldProps & { rows?: number }) {
  const { register } = useFormContext()
  return (
    <FieldFrame {...props}>
      {(control) => (
        <textarea
          {...control}
          {...register(props.name, {
            setValueAs: props.optional ? readText(props.optional) : undefined,
          })}
          rows={rows}
          disabled={props.disabled}
          className="control max-w-2xl resize-y"
        />
      )}
    </FieldFrame>
  )
}
