import { FieldRow } from '../../forms/FieldRow.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { TextField } from '../../forms/TextField.tsx'

/** What the study is called. */
export function StudySection() {
  return (
    <FormSection title="The study">
      <FieldRow>
        <TextField
          name="code"
          label="Short name"
          hint="Stands on every page and cannot change. Capital letters, digits and hyphens."
          mono
          width="short"
        />
      </FieldRow>
      <div className="max-w-3xl">
        <TextField
          name="title"
          label="Title"
          hint="One line that says what is studied in whom."
          width="full"
        />
      </div>
    </FormSection>
  )
}
