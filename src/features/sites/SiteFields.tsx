import { FieldRow } from '../../forms/FieldRow.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { TextField } from '../../forms/TextField.tsx'

type SiteFieldsProps = {
  /** Path of the site in the form's values, with a point at its end: "sites.0."; or nothing. */
  at?: string
  /** A saved site keeps its prefix: it stands in codes. */
  prefixFixed?: boolean
}

export function SiteFields({ at = '', prefixFixed = false }: SiteFieldsProps) {
  return (
    <FieldRow>
      <TextField name={`${at}name`} label="Site" />
      {!prefixFixed && (
        <TextField name={`${at}prefix`} label="Prefix of its subject codes" mono width="short" />
      )}
      <NumberField name={`${at}plannedSubjects`} label="Planned subjects" optional="null" />
    </FieldRow>
  )
}
