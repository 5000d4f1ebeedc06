import { useFormContext } from 'react-hook-form'
import { readText } from './blank.ts'
import { FieldFrame, type FieldProps } from './FieldFrame.tsx'

type DateFieldProps = FieldProps & {
  /** yyyy-mm-dd */
  min?: string
  /** yyyy-mm-dd */
  max?: string
}

/** A calendar day as yyyy-mm-dd; blank is no day. */
export function DateField({ min, max, ...props }: DateFieldProps) {
  const { register } = useFormContext()
  return (
    <FieldFrame {...props}>
      {(control) => (
        <input
          {...control}
          {...register(props.name, { setValueAs: readText(props.optional) })}
          type="date"
          min={min}
          max={max}
          disabled={props.disabled}
          className="control max-w-48"
        />
      )}
    </FieldFrame>
  )
}
