import { useId, useState } from 'react'
import { EntryGrid } from '../../forms/EntryGrid.tsx'
import { Notice } from '../../ui/Notice.tsx'
import type { Conversion } from './conversion.ts'
import { CONVERSIONS } from './conversions.ts'

const ALL = CONVERSIONS.flatMap(({ conversions }) => conversions)

/** One conversion at a time: its numbers on the left, what they become on the right. */
export function ConversionsPart() {
  const id = useId()
  const [key, setKey] = useState(ALL[0]!.key)
  const conversion = ALL.find((each) => each.key === key) ?? ALL[0]!
  return (
    <>
      <div className="mb-5 max-w-md">
        <label htmlFor={id} className="block text-[14px] font-semibold">
          Convert
        </label>
        <select
          id={id}
          className="control mt-1.5"
          value={conversion.key}
          onChange={(event) => setKey(event.target.value)}
        >
          {CONVERSIONS.map(({ label, conversions }) => (
            <optgroup key={label} label={label}>
              {conversions.map((each) => (
                <option key={each.key} value={each.key}>
                  {each.label}
                </option>
              ))}
            </optgroup>
          ))}
        </select>
      </div>
      <Converter key={conversion.key} conversion={conversion} />
    </>
  )
}

function Converter({ conversion }: { conversion: Conversion }) {
  const [texts, setTexts] = useState<Record<string, string>>({})
  const { results, problems } = conversion.convert(texts)
  return (
    <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.9fr)_minmax(0,1fr)]">
      <EntryGrid
        entries={conversion.entries}
        names={Object.keys(conversion.entries)}
        texts={texts}
        problems={problems}
        onText={(name, text) => setTexts({ ...texts, [name]: text })}
      />
      <div className="min-w-0" aria-live="polite">
        {results ? (
          <dl className="mb-3 flex flex-wrap gap-x-10 gap-y-4">
            {results.map(({ term, value }) => (
              <div key={term} className="flex flex-col-reverse">
                <dt className="text-sm text-ink-2">{term}</dt>
                <dd className="text-2xl font-bold tracking-tight">{value}</dd>
              </div>
            ))}
          </dl>
        ) : (
          <Notice tone="warn" title="No answer yet">
            Mend the numbers that are marked on this page.
          </Notice>
        )}
        <p className="max-w-[68ch] text-sm text-ink-2">{conversion.note}</p>
      </div>
    </div>
  )
}
