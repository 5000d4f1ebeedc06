import type { FieldProps } from './FieldFrame.tsx'

/** What a field hands over when nothing stands in it. */
export function blankOf(optional: FieldProps['optional']): null | undefined {
  return optional === 'null' ? null : undefined
}

/** For react-hook-form's `setValueAs`: blank text is no text. */
export function readText(optional: FieldProps['optional']): (text: unknown) => unknown {
  return (text) => (text === '' || text === null || text === undefined ? blankOf(optional) : text)
}
