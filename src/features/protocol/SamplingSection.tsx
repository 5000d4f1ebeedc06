import { SAMPLING_LABELS, SAMPLINGS, type Sampling } from '#shared/terms/protocol.ts'
import { FormSection } from '../../forms/FormSection.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { RadioField } from '../../forms/RadioField.tsx'

const HINTS: Record<Sampling, string> = {
  cohort: 'Everybody who met the criteria, before anyone knew who has the condition.',
  byOutcome:
    'Chosen because they have or do not have the condition. Predictive values seen in the data then mean nothing and are not shown.',
}

/** How subjects came in, and how many were planned. */
export function SamplingSection() {
  return (
    <FormSection title="How subjects came in">
      <RadioField
        name="document.sampling"
        label="Subjects were sampled"
        options={SAMPLINGS.map((value) => ({
          value,
          label: SAMPLING_LABELS[value],
          hint: HINTS[value],
        }))}
      />
      <NumberField
        name="document.plannedSubjects"
        label="Planned subjects in all"
        optional="null"
      />
    </FormSection>
  )
}
