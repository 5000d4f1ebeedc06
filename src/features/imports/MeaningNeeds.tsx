import { useController, useFormContext } from 'react-hook-form'
import { type ColumnMeaning, type FoundColumn, OPEN_AGES } from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { CodingField } from './CodingField.tsx'
import { CompactField } from './CompactField.tsx'

type NeedsProps = {
  /** Path of the meaning: "mapping.columns.3.meaning". */
  name: string
  meaning: ColumnMeaning
  column: FoundColumn
  analytes: readonly Analyte[]
}

/** What else has to be said about a column once its meaning is chosen. */
export function MeaningNeeds({ name, meaning, column, analytes }: NeedsProps) {
  switch (meaning.as) {
    case 'leaveOut':
      return null
    case 'subject':
      return <Hint>Tells subjects apart. Only a keyed digest of it is kept.</Hint>
    case 'site':
      return <Hint>Say below which word stands for which site.</Hint>
    case 'sessionNumber':
      return <Hint>Whole numbers. Without such a column, rows count 1, 2, 3 in order.</Hint>
    case 'ageBand':
      return <Hint>Five-year bands such as 50-54, and 90+.</Hint>
    case 'ageYears':
      return <OpenAge name={`${name}.andOver`} column={column} />
    case 'sex':
    case 'outcome':
      return <CodingField name={name} column={column} />
    case 'covariate':
      return <CovariateKey name={`${name}.key`} column={column} />
    default:
      return (
        <>
          <AnalyteChoice name={`${name}.analyteKey`} column={column} analytes={analytes} />
          {meaning.as === 'belowLod' && <Hint>1/0, yes/no or true/false.</Hint>}
        </>
      )
  }
}

const Hint = ({ children }: { children: string }) => (
  <p className="text-sm text-ink-2 wide:pt-2.5">{children}</p>
)

function AnalyteChoice({
  name,
  column,
  analytes,
}: {
  name: string
  column: FoundColumn
  analytes: readonly Analyte[]
}) {
  const { register } = useFormContext()
  return (
    <CompactField name={name} label={`Analyte of ${column.name}`}>
      {(control) => (
        <select {...control} {...register(name)} className="control">
          <option value="">Choose the analyte</option>
          {analytes.map((analyte) => (
            <option key={analyte.key} value={analyte.key}>
              {[analyte.name, unitLabel(analyte.unit)].filter((part) => part !== '').join(', ')}
            </option>
          ))}
        </select>
      )}
    </CompactField>
  )
}

/** A survey may stop counting at an age; its last number then stands for all older people. */
function OpenAge({ name, column }: { name: string; column: FoundColumn }) {
  const { field } = useController({ name })
  return (
    <>
      <CompactField name={name} label={`Oldest age in ${column.name}`}>
        {(control) => (
          <select
            {...control}
            value={field.value === null ? '' : String(field.value)}
            onChange={(event) =>
              field.onChange(event.target.value === '' ? null : Number(event.target.value))
            }
            className="control"
          >
            <option value="">Every age is exact</option>
            {OPEN_AGES.map((age) => (
              <option key={age} value={age}>
                {age} means {age} and over
              </option>
            ))}
          </select>
        )}
      </CompactField>
      <p className="mt-1 text-sm text-ink-2">Only the five-year band is kept.</p>
    </>
  )
}

function CovariateKey({ name, column }: { name: string; column: FoundColumn }) {
  const { register } = useFormContext()
  return (
    <CompactField
      name={name}
      label={`Key of the covariate ${column.name}`}
      showLabel="Kept under the key"
    >
      {(control) => (
        <input
          {...control}
          {...register(name)}
          autoComplete="off"
          spellCheck={false}
          className="control font-mono text-[14px]"
        />
      )}
    </CompactField>
  )
}
