import { FormSection } from '../../forms/FormSection.tsx'
import { TextField } from '../../forms/TextField.tsx'

/** What the sensor is to find, and by what that is decided. */
export function ConditionSection() {
  return (
    <FormSection title="Target condition and reference standard">
      <div className="flex max-w-3xl flex-col gap-5">
        <TextField
          name="document.targetCondition"
          label="Target condition"
          hint="What the sensor is to tell apart: the disease, its stage, or the state."
          width="full"
        />
        <TextField
          name="document.referenceStandard"
          label="Reference standard"
          hint="How it was decided whether a subject has the condition, with threshold and readers."
          width="full"
        />
      </div>
    </FormSection>
  )
}
