import { AGE_BANDS, SEX_LABELS, SEXES } from '#shared/terms/subject.ts'
import { RadioField } from '../../forms/RadioField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { ageBandWords } from './subjectWords.ts'

/** What is kept of a subject: no more than tells two people of a ward apart. */
export function SubjectFields() {
  return (
    <>
      <RadioField
        name="sex"
        label="Sex"
        options={SEXES.map((value) => ({ value, label: SEX_LABELS[value] }))}
        inline
      />
      <SelectField
        name="ageBand"
        label="Age band, years"
        width="short"
        options={AGE_BANDS.map((value) => ({ value, label: ageBandWords(value) }))}
      />
    </>
  )
}
