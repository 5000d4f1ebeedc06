import { createContext, useContext } from 'react'

export type FormParts = {
  /** The id of a field's control, unique on the page. */
  idOf: (name: string) => string
  /** What the summary calls a field. */
  labels: Map<string, string>
  /** The boxes that read a number, so that unreadable text can be told apart from other text. */
  numberFields: Set<string>
}

export const FormContext = createContext<FormParts | null>(null)

/** What the entry of a list that a field stands in is called: "Site 2". */
export const EntryName = createContext<string | null>(null)

export function useFormParts(): FormParts {
  const parts = useContext(FormContext)
  if (!parts) throw new Error('A field stands outside of a Form')
  return parts
}
