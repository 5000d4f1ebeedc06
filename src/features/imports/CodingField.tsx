import { useController } from 'react-hook-form'
import type { FoundColumn, MeaningOf } from '#shared/schemas/import.ts'
import { plainWord } from '#shared/terms/codeWords.ts'
import { OUTCOME_LABELS } from '#shared/terms/outcome.ts'
import { SEX_LABELS } from '#shared/terms/subject.ts'
import { CompactField } from './CompactField.tsx'

type Coded = MeaningOf<'outcome'> | MeaningOf<'sex'>
type Sides = Record<string, string[]>

/** Which word stands for what: one choice for each word of the column, and a box for further ones. */
export function CodingField({ name, column }: { name: string; column: FoundColumn }) {
  const { field } = useController({ name })
  const meaning = field.value as Coded
  const { as, ...sides } = meaning
  const labels: Record<string, string> = as === 'outcome' ? OUTCOME_LABELS : SEX_LABELS
  const found = column.words ?? []
  const place = (word: string, side: string) =>
    field.onChange({ ...meaning, ...moved(sides, word, side) })

  return (
    <div className="flex flex-col gap-1.5">
      {found.map((word) => (
        <label key={word} className="grid grid-cols-[minmax(3.5em,auto)_1fr] items-center gap-2">
          <span className="font-mono text-[14px] break-all">{word}</span>
          <select
            aria-label={`What “${word}” in ${column.name} stands for`}
            value={sideOf(sides, word)}
            onChange={(event) => place(word, event.target.value)}
            className="control"
          >
            <option value="">nothing: refuse the row</option>
            {Object.keys(sides).map((side) => (
              <option key={side} value={side}>
                {labels[side]}
              </option>
            ))}
          </select>
        </label>
      ))}
      {Object.keys(sides).map((side) => (
        <FurtherWords
          key={side}
          name={`${name}.${side}`}
          label={`${labels[side]}, ${column.name}`}
          caption={labels[side] ?? side}
          found={found}
          open={column.words === null}
        />
      ))}
    </div>
  )
}

const sideOf = (sides: Sides, word: string): string =>
  Object.keys(sides).find((side) => has(sides[side], word)) ?? ''

const has = (words: readonly string[] | undefined, word: string) =>
  words?.some((each) => plainWord(each) === plainWord(word)) ?? false

/** Takes the word from wherever it stands and puts it on one side, or on none. */
function moved(sides: Sides, word: string, to: string): Sides {
  return Object.fromEntries(
    Object.entries(sides).map(([side, words]) => {
      const others = words.filter((each) => plainWord(each) !== plainWord(word))
      return [side, side === to ? [...others, word] : others]
    }),
  )
}

type FurtherWordsProps = {
  name: string
  label: string
  caption: string
  found: readonly string[]
  open: boolean
}

/** Words that the first rows do not show, parted by commas. */
function FurtherWords({ name, label, caption, found, open }: FurtherWordsProps) {
  const { field } = useController({ name })
  const words = (field.value as string[] | undefined) ?? []
  const further = words.filter((word) => !found.includes(word))
  if (!open && further.length === 0) return null
  const change = (text: string) =>
    field.onChange([
      ...words.filter((word) => found.includes(word)),
      ...text
        .split(',')
        .map((word) => word.trim())
        .filter((word) => word !== ''),
    ])
  return (
    <CompactField name={name} label={label} showLabel={`${caption}: words, parted by commas`}>
      {(control) => (
        <input
          {...control}
          defaultValue={further.join(', ')}
          onChange={(event) => change(event.target.value)}
          onBlur={field.onBlur}
          autoComplete="off"
          spellCheck={false}
          className="control"
        />
      )}
    </CompactField>
  )
}
