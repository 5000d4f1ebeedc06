import { useState } from 'react'
import { useController, useFormContext } from 'react-hook-form'
import type { ImportReading } from '#shared/schemas/import.ts'
import type { Site } from '#shared/schemas/site.ts'
import { FieldFrame } from '../../forms/FieldFrame.tsx'
import { Button } from '../../ui/Button.tsx'
import { CompactField } from './CompactField.tsx'
import type { MappingDraft } from './mappingDefaults.ts'

type SitePartProps = { reading: ImportReading; sites: readonly Site[] }

/** The site of the rows: one for all of them, or by the words of a column. */
export function SitePart({ reading, sites }: SitePartProps) {
  const { watch } = useFormContext<{ mapping: MappingDraft }>()
  const index = watch('mapping.columns').findIndex((column) => column.meaning.as === 'site')
  if (index >= 0)
    return <SitesByWord key={index} words={reading.columns[index]?.words ?? []} sites={sites} />
  return <OneSite sites={sites} />
}

/** Not chosen is null; the server then says that one is needed. */
function OneSite({ sites }: { sites: readonly Site[] }) {
  const { field } = useController({ name: 'mapping.siteId' })
  return (
    <FieldFrame
      name="mapping.siteId"
      label="Site of all rows"
      hint="No column of the file names a site."
    >
      {(control) => (
        <select
          {...control}
          value={field.value ?? ''}
          onChange={(event) => field.onChange(event.target.value || null)}
          className="control max-w-md"
        >
          <option value="">Choose the site</option>
          {sites.map((site) => (
            <option key={site.id} value={site.id}>
              {site.name}
            </option>
          ))}
        </select>
      )}
    </FieldFrame>
  )
}

function SitesByWord({ words, sites }: { words: readonly string[]; sites: readonly Site[] }) {
  const { field } = useController({ name: 'mapping.sitesByWord' })
  const chosen = field.value as Record<string, string>
  const [added, setAdded] = useState<string[]>([])
  const [word, setWord] = useState('')
  const all = [...new Set([...words, ...Object.keys(chosen), ...added])]
  const place = (of: string, siteId: string) => {
    const { [of]: _before, ...others } = chosen
    field.onChange(siteId === '' ? others : { ...others, [of]: siteId })
  }
  return (
    <CompactField name="mapping.sitesByWord" label="Sites by word">
      {(control) => (
        <div id={control.id} tabIndex={-1} className="grid max-w-xl gap-1.5">
          {all.map((each) => (
            <label key={each} className="grid grid-cols-[minmax(6em,1fr)_2fr] items-center gap-3">
              <span className="font-mono text-[14px] break-all">{each}</span>
              <select
                aria-label={`Site of “${each}”`}
                value={chosen[each] ?? ''}
                onChange={(event) => place(each, event.target.value)}
                className="control"
              >
                <option value="">no site: refuse the row</option>
                {sites.map((site) => (
                  <option key={site.id} value={site.id}>
                    {site.name}
                  </option>
                ))}
              </select>
            </label>
          ))}
          <div className="grid grid-cols-[minmax(6em,1fr)_2fr] items-center gap-3">
            <input
              aria-label="Another word of the site column"
              placeholder="Another word"
              value={word}
              onChange={(event) => setWord(event.target.value)}
              className="control font-mono text-[14px]"
            />
            <div>
              <Button
                kind="quiet"
                onClick={() => {
                  if (word.trim() !== '') setAdded([...added, word.trim()])
                  setWord('')
                }}
              >
                Add the word
              </Button>
            </div>
          </div>
        </div>
      )}
    </CompactField>
  )
}
