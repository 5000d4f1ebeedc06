import { useCallback, useEffect, useState } from 'react'
import type { FieldValues, UseFormReturn } from 'react-hook-form'

/**
 * Whether a form holds something that is not saved. The form library's own answer takes a field that
 * was left blank for a change, since it begins as '' and is held as no value.
 * @returns whether it does, and how to say that what it holds now is saved
 */
export function useChanged<Values extends FieldValues, Output>(
  form: UseFormReturn<Values, unknown, Output>,
): [changed: boolean, settle: () => void] {
  const [saved] = useState(() => ({ text: saying(form.formState.defaultValues) }))
  const [changed, setChanged] = useState(false)
  useEffect(() => {
    const { unsubscribe } = form.watch((values) => setChanged(saying(values) !== saved.text))
    return unsubscribe
  }, [form, saved])
  const settle = useCallback(() => {
    saved.text = saying(form.getValues())
    setChanged(false)
  }, [form, saved])
  return [changed, settle]
}

/** What was said, in a text to compare: blank in any of its forms is nothing. */
function saying(values: unknown): string {
  return JSON.stringify(values, (_name, value) =>
    value === '' || value === null ? undefined : value,
  )
}
