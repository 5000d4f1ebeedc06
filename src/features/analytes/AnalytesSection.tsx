import { useFieldArray } from 'react-hook-form'
import type { AnalyteInput } from '#shared/schemas/protocol.ts'
import { FieldList, FieldListEntry } from '../../forms/FieldList.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { AnalyteFields } from './AnalyteFields.tsx'
import { AnalytePicker } from './AnalytePicker.tsx'

type AnalytesSectionProps = {
  /** What else in the form speaks of analytes. */
  onAdded?: (key: string) => void
  onRemoved?: (key: string) => void
}

/** What a study that is being set up measures. */
export function AnalytesSection({ onAdded, onRemoved }: AnalytesSectionProps) {
  const { fields, append, remove } = useFieldArray<
    { analytes: AnalyteInput[] },
    'analytes',
    'rowKey'
  >({ name: 'analytes', keyName: 'rowKey' })
  return (
    <FormSection title="Analytes">
      <FieldList name="analytes" label="Analytes">
        {fields.map((field, index) => (
          <FieldListEntry
            key={field.rowKey}
            label={field.name}
            onRemove={() => {
              remove(index)
              onRemoved?.(field.key)
            }}
          >
            <AnalyteFields analyteKey={field.key} at={`analytes.${index}.`} />
          </FieldListEntry>
        ))}
        <AnalytePicker
          taken={fields.map((field) => field.key)}
          onPick={(analyte) => {
            append(analyte, { shouldFocus: false })
            onAdded?.(analyte.key)
          }}
        />
      </FieldList>
    </FormSection>
  )
}
