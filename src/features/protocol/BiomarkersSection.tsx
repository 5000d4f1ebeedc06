import { useEffect } from 'react'
import { useFieldArray, useFormContext, useWatch } from 'react-hook-form'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { DIRECTION_LABELS, DIRECTIONS } from '#shared/terms/protocol.ts'
import { FieldList, FieldListEntry } from '../../forms/FieldList.tsx'
import { FieldRow } from '../../forms/FieldRow.tsx'
import { FormSection } from '../../forms/FormSection.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { RadioField } from '../../forms/RadioField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { type AnalyteOption, optionsOf, unitOf } from './analyteOption.ts'

type Values = { document: ProtocolDocument }

export const BLANK_BIOMARKER = { analyteKey: '', direction: undefined, plannedCutOff: null }

/** Which analytes are to tell the condition, in which direction and from which value on. */
export function BiomarkersSection({ analytes }: { analytes: readonly AnalyteOption[] }) {
  const { fields, append, remove } = useFieldArray<Values, 'document.biomarkers', 'rowKey'>({
    name: 'document.biomarkers',
    keyName: 'rowKey',
  })
  const chosen = useWatch<Values, 'document.biomarkers'>({ name: 'document.biomarkers' })
  const keys = (chosen ?? []).map((each) => each.analyteKey)
  return (
    <FormSection title="Biomarkers">
      <FieldList
        name="document.biomarkers"
        label="Biomarkers"
        add={
          fields.length < analytes.length
            ? { label: 'Add another biomarker', onAdd: () => append(BLANK_BIOMARKER as never) }
            : undefined
        }
      >
        {fields.map((field, index) => (
          <FieldListEntry
            key={field.rowKey}
            label={`Biomarker ${index + 1}`}
            onRemove={fields.length > 1 ? () => remove(index) : undefined}
          >
            <FieldRow>
              <SelectField
                name={`document.biomarkers.${index}.analyteKey`}
                label="Analyte"
                options={optionsOf(analytes)}
                placeholder={analytes.length > 0 ? 'Choose' : 'Add an analyte first'}
              />
              <NumberField
                name={`document.biomarkers.${index}.plannedCutOff`}
                label="Planned cut-off"
                optional="null"
                unit={unitOf(analytes, keys[index])}
              />
            </FieldRow>
            <RadioField
              name={`document.biomarkers.${index}.direction`}
              label="Direction"
              hint="Decided before looking at the data. It is never guessed from them."
              options={DIRECTIONS.map((value) => ({ value, label: DIRECTION_LABELS[value] }))}
              inline
            />
          </FieldListEntry>
        ))}
      </FieldList>
      <PrimaryField analytes={analytes.filter((analyte) => keys.includes(analyte.key))} />
    </FormSection>
  )
}

/** Asked for where there is a choice; the only biomarker is the primary one. */
function PrimaryField({ analytes }: { analytes: readonly AnalyteOption[] }) {
  const { setValue, getValues } = useFormContext<Values>()
  const only = analytes.length === 1 ? analytes[0]!.key : null
  useEffect(() => {
    if (only !== null && getValues('document.primaryAnalyteKey') !== only)
      setValue('document.primaryAnalyteKey', only)
  }, [only, setValue, getValues])
  if (analytes.length < 2) return null
  return (
    <SelectField
      name="document.primaryAnalyteKey"
      label="Primary biomarker"
      hint="The one that the study's conclusion rests on."
      options={optionsOf(analytes)}
    />
  )
}
