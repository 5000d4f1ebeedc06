import { useEffect, useState } from 'react'
import { useController } from 'react-hook-form'
import { classes } from '../ui/classes.ts'
import { blankOf } from './blank.ts'
import { FIELD_WIDTHS, FieldFrame, type FieldProps, type FieldWidth } from './FieldFrame.tsx'
import { useFormParts } from './formContext.ts'
import { readNumber } from './readNumber.ts'

type NumberFieldProps = FieldProps & {
  /** Stands beside the box. */
  unit?: string
  width?: FieldWidth
}

/** A number as text, so that nothing is rounded, lost or guessed; blank is no value, never 0. */
export function NumberField({ unit, width = 'short', ...props }: NumberFieldProps) {
  const { numberFields } = useFormParts()
  const { field } = useController({ name: props.name })
  const [text, setText] = useState(() => asText(field.value))
  if (heldValue(text, undefined) !== (field.value ?? undefined)) setText(asText(field.value))

  useEffect(() => {
    numberFields.add(props.name)
    return () => {
      numberFields.delete(props.name)
    }
  }, [numberFields, props.name])

  return (
    <FieldFrame {...props}>
      {(control) => (
        <span className="flex items-center gap-3">
          <input
            {...control}
            ref={field.ref}
            name={field.name}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            value={text}
            disabled={props.disabled}
            onBlur={field.onBlur}
            onChange={(event) => {
              setText(event.target.value)
              field.onChange(heldValue(event.target.value, blankOf(props.optional)))
            }}
            className={classes('control', FIELD_WIDTHS[width])}
          />
          {unit !== undefined && <span>{unit}</span>}
        </span>
      )}
    </FieldFrame>
  )
}

/** What the form holds: the number, nothing, or the text that no number could be read from. */
function heldValue(text: string, blank: null | undefined): number | string | null | undefined {
  const reading = readNumber(text)
  return reading.problem === undefined ? (reading.value ?? blank) : text
}

function asText(value: unknown): string {
  return typeof value === 'number' || typeof value === 'string' ? String(value) : ''
}
