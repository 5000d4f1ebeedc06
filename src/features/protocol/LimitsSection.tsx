import { useFieldArray, useWatch } from 'react-hook-form'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { FieldList, FieldListEntry } from '../../forms/FieldList.tsx'
import { FieldRow } from '../../forms/FieldRow.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { type AnalyteOption, optionsOf, unitOf } from './analyteOption.ts'

type Values = { document: ProtocolDocument }

const BLANK_LIMITS = { analyteKey: '', lower: undefined, upper: undefined }

/** Which difference between sensor and reference analyser would still be acceptable. */
export function LimitsSection({ analytes }: { analytes: readonly AnalyteOption[] }) {
  const { fields, append, remove } = useFieldArray<Values, 'document.acceptanceLimits', 'rowKey'>({
    name: 'document.acceptanceLimits',
    keyName: 'rowKey',
  })
  const chosen = useWatch<Values, 'document.acceptanceLimits'>({
    name: 'document.acceptanceLimits',
  })
  const add = () =>
    append({
      ...BLANK_LIMITS,
      analyteKey: fields.length === 0 && analytes.length === 1 ? analytes[0]!.key : '',
    } as never)
  return (
    <FormSection title="Acceptance limits">
      <p className="-mt-3 max-w-[70ch] text-sm text-ink-2">
        Sensor minus reference analyser, in the unit of the analyte: the smallest and the largest
        difference that would still be acceptable. Leave this out where there is no reference
        analyser.
      </p>
      <FieldList
        name="document.acceptanceLimits"
        label="Acceptance limits"
        add={
          fields.length < Math.max(analytes.length, 1)
            ? { label: 'Set limits for an analyte', onAdd: add }
            : undefined
        }
      >
        {fields.map((field, index) => {
          const unit = unitOf(analytes, chosen?.[index]?.analyteKey)
          const at = `document.acceptanceLimits.${index}`
          return (
            <FieldListEntry
              key={field.rowKey}
              label={`Limits ${index + 1}`}
              onRemove={() => remove(index)}
            >
              <FieldRow>
                <SelectField
                  name={`${at}.analyteKey`}
                  label="Analyte"
                  options={optionsOf(analytes)}
                />
                <NumberField name={`${at}.lower`} label="Lowest difference" unit={unit} />
                <NumberField name={`${at}.upper`} label="Highest difference" unit={unit} />
              </FieldRow>
            </FieldListEntry>
          )
        })}
      </FieldList>
    </FormSection>
  )
}
