import { UNITS } from '#shared/terms/gases.ts'
import { FieldRow } from '../../forms/FieldRow.tsx'
import { NumberField } from '../../forms/NumberField.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { TextField } from '../../forms/TextField.tsx'
import { describeGas, gasOf } from './analyteKey.ts'

const UNIT_OPTIONS = Object.entries(UNITS).map(([value, label]) => ({ value, label }))

type AnalyteFieldsProps = {
  analyteKey: string
  /** Path of the analyte in the form's values, with a point at its end: "analytes.0."; or nothing. */
  at?: string
}

/** Name and unit; what a gas of the catalogue is stands fixed, one's own may be described. */
export function AnalyteFields({ analyteKey, at = '' }: AnalyteFieldsProps) {
  const gas = gasOf(analyteKey)
  return (
    <>
      <FieldRow>
        <TextField name={`${at}name`} label="Analyte" hint={gas && describeGas(gas)} />
        <SelectField
          name={`${at}unit`}
          label="Unit of its values"
          options={UNIT_OPTIONS}
          width="short"
        />
      </FieldRow>
      {!gas && (
        <FieldRow>
          <TextField name={`${at}formula`} label="Formula" optional width="short" />
          <TextField name={`${at}casNumber`} label="CAS number" optional width="short" />
          <NumberField name={`${at}molarMassGPerMol`} label="Molar mass" unit="g/mol" optional />
        </FieldRow>
      )}
    </>
  )
}
