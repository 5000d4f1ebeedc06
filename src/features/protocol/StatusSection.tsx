import { useWatch } from 'react-hook-form'
import {
  CAUTIONS,
  REGULATORY_STATUS_LABELS,
  REGULATORY_STATUSES,
  type RegulatoryStatus,
} from '#shared/terms/cautions.ts'
import { FormSection } from '../../forms/FormSection.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { Caution } from '../../ui/Caution.tsx'

/** How the sensor stands before the law, and the caution that follows from it. */
export function StatusSection() {
  const status: RegulatoryStatus | undefined = useWatch({ name: 'document.regulatoryStatus' })
  const caution = status && CAUTIONS[status]
  return (
    <FormSection title="Regulatory status">
      <div className="grid max-w-4xl gap-x-10 gap-y-4 wide:grid-cols-2">
        <RadioField
          name="document.regulatoryStatus"
          label="The sensor in this study is"
          hint="Ask whoever answers for regulatory questions in your hospital."
          options={REGULATORY_STATUSES.map((value) => ({
            value,
            label: REGULATORY_STATUS_LABELS[value],
          }))}
        />
        {caution && (
          <div aria-live="polite">
            <p className="mb-2 text-sm text-ink-2">
              This then stands on every screen, figure and page that carries a result:
            </p>
            <Caution title={caution.title}>{caution.text}</Caution>
          </div>
        )}
      </div>
    </FormSection>
  )
}
