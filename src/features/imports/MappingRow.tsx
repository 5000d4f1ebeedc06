import { useController, useFormContext } from 'react-hook-form'
import type { ColumnMeaning, FoundColumn, Meaning } from '#shared/schemas/import.ts'
import type { Analyte } from '#shared/schemas/protocol.ts'
import { MEANING_GROUPS, MEANING_LABELS, SUSPICION_WORDS } from '#shared/terms/importColumn.ts'
import { classes } from '../../ui/classes.ts'
import { Tag } from '../../ui/Tag.tsx'
import { CompactField } from './CompactField.tsx'
import { MeaningNeeds } from './MeaningNeeds.tsx'
import { newMeaning } from './newMeaning.ts'

type MappingRowProps = { index: number; column: FoundColumn; analytes: readonly Analyte[] }

export const MAPPING_GRID =
  'tablet:grid tablet:grid-cols-2 tablet:gap-x-4 wide:grid-cols-[minmax(0,1.1fr)_minmax(0,1.25fr)_minmax(0,1.15fr)_minmax(0,1.5fr)] wide:gap-x-5'

/** A column of the file: what stands in it, what it means, and what that needs. */
export function MappingRow({ index, column, analytes }: MappingRowProps) {
  const at = `mapping.columns.${index}`
  const { field } = useController({ name: `${at}.meaning` })
  const meaning = field.value as ColumnMeaning
  const left = meaning.as === 'leaveOut'
  return (
    <li className={classes(MAPPING_GRID, 'border-b border-rule py-3 last:border-b-0')}>
      <div className="min-w-0 wide:pt-2">
        <span className={classes('font-semibold break-words', left && 'font-normal text-ink-2')}>
          {column.name}
        </span>
        {column.suspicion && (
          <p className="mt-1">
            <Tag tone="warn">looks like {SUSPICION_WORDS[column.suspicion]}</Tag>
          </p>
        )}
      </div>
      <p className="min-w-0 text-sm text-ink-2 max-tablet:mt-1 tablet:max-wide:text-right wide:pt-2.5">
        {column.suspicion ? 'Not shown.' : <Samples column={column} />}
      </p>
      <div className="min-w-0 max-wide:mt-2">
        <CompactField name={`${at}.meaning`} label={`Meaning of ${column.name}`}>
          {(control) => (
            <select
              {...control}
              value={meaning.as}
              onChange={(event) =>
                field.onChange(newMeaning(event.target.value as Meaning, column, analytes))
              }
              onBlur={field.onBlur}
              className={classes('control', left && 'text-ink-2')}
            >
              <option value="leaveOut">{MEANING_LABELS.leaveOut}</option>
              {MEANING_GROUPS.map(({ label, meanings }) => (
                <optgroup key={label} label={label}>
                  {meanings.map((each) => (
                    <option key={each} value={each}>
                      {MEANING_LABELS[each]}
                    </option>
                  ))}
                </optgroup>
              ))}
            </select>
          )}
        </CompactField>
      </div>
      <div className="flex min-w-0 flex-col gap-2 max-wide:mt-2">
        <MeaningNeeds
          key={meaning.as}
          name={`${at}.meaning`}
          meaning={meaning}
          column={column}
          analytes={analytes}
        />
        {column.suspicion && !left && <Declared name={`${at}.declared`} column={column} />}
      </div>
    </li>
  )
}

function Samples({ column }: { column: FoundColumn }) {
  const { samples, blanks } = column
  return (
    <>
      {samples.length > 0 && <span className="break-words text-ink">{samples.join(' · ')}</span>}
      {samples.length === 0 && 'all blank'}
      {samples.length > 0 && blanks > 0 && (
        <span className="whitespace-nowrap"> · {blanks.toLocaleString('en-GB')} blank</span>
      )}
    </>
  )
}

function Declared({ name, column }: { name: string; column: FoundColumn }) {
  const { register } = useFormContext()
  return (
    <CompactField
      name={name}
      label={`What ${column.name} holds`}
      showLabel="It identifies nobody, because it holds"
    >
      {(control) => (
        <input {...control} {...register(name)} autoComplete="off" className="control" />
      )}
    </CompactField>
  )
}
