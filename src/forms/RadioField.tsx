import { useController } from 'react-hook-form'
import { classes } from '../ui/classes.ts'
import { FieldFrame, type FieldProps } from './FieldFrame.tsx'

type RadioFieldProps = FieldProps & {
  options: readonly { value: string; label: string; hint?: string }[]
  /** Side by side, for two or three short answers. */
  inline?: boolean
}

/** One of a few, all in sight; nothing chosen is undefined. */
export function RadioField({ options, inline = false, ...props }: RadioFieldProps) {
  const { field } = useController({ name: props.name })
  return (
    <FieldFrame {...props} group>
      {({ id }) => (
        <div className={classes('flex gap-x-6', inline ? 'flex-wrap' : 'flex-col')}>
          {options.map((option) => (
            <label key={option.value} className="flex min-h-10 items-start gap-3 py-2">
              <input
                type="radio"
                name={`${id}-choice`}
                value={option.value}
                checked={field.value === option.value}
                onChange={() => field.onChange(option.value)}
                onBlur={field.onBlur}
                className="tick"
              />
              <span>
                {option.label}
                {option.hint !== undefined && (
                  <span className="block text-sm text-ink-2">{option.hint}</span>
                )}
              </span>
            </label>
          ))}
        </div>
      )}
    </FieldFrame>
  )
}
