import { useId, useState } from 'react'
import type { AnalyteInput } from '#shared/schemas/protocol.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { freeKey, fromCatalogue, searchCatalogue } from './analyteKey.ts'

type AnalytePickerProps = {
  /** Keys of what was chosen before. */
  taken: readonly string[]
  onPick: (analyte: AnalyteInput) => void
}

const ROW =
  'flex w-full flex-wrap items-baseline gap-x-3 px-3 py-1.5 text-left hover:bg-spruce-2 focus-visible:-outline-offset-2'

/** Searches the catalogue of breath gases, and takes whatever is not in it as an analyte of one's own. */
export function AnalytePicker({ taken, onPick }: AnalytePickerProps) {
  const id = useId()
  const [typed, setTyped] = useState('')
  const name = typed.trim()
  const found = searchCatalogue(name, taken)
  const pick = (analyte: AnalyteInput) => {
    onPick(analyte)
    setTyped('')
  }
  const exact = found.some((gas) => gas.name.toLowerCase() === name.toLowerCase())
  return (
    <div className="max-w-2xl">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        Add an analyte
      </label>
      <p id={`${id}-hint`} className="text-sm text-ink-2">
        Search the catalogue by name, formula or CAS number, or type the name of something else, gas
        or not.
      </p>
      <input
        id={id}
        type="search"
        autoComplete="off"
        spellCheck={false}
        aria-describedby={`${id}-hint`}
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        onKeyDown={(event) => {
          // Enter would send the whole form.
          if (event.key === 'Enter') event.preventDefault()
        }}
        className="control mt-1.5 rounded-b-none"
      />
      <ul
        aria-label="Catalogue of breath gases"
        className="max-h-48 overflow-y-auto rounded-b border-[1.5px] border-t-0 border-rule-2"
      >
        {found.map((gas) => (
          <li key={gas.key} className="border-b border-rule last:border-b-0">
            <button type="button" className={ROW} onClick={() => pick(fromCatalogue(gas))}>
              <span className="min-w-40 flex-1">{gas.name}</span>
              <span className="w-16 text-sm text-ink-2">{gas.formula}</span>
              <span className="w-24 text-sm text-ink-2">{gas.casNumber}</span>
              <span className="w-12 text-sm text-ink-2">{unitLabel(gas.unit)}</span>
            </button>
          </li>
        ))}
        {name !== '' && !exact && (
          <li>
            <button
              type="button"
              className={`${ROW} font-semibold text-spruce`}
              onClick={() => pick({ key: freeKey(name, taken), name, unit: undefined as never })}
            >
              Add “{name}” as an analyte of your own
            </button>
          </li>
        )}
        {name === '' && found.length === 0 && (
          <li className="px-3 py-1.5 text-sm text-ink-2">The whole catalogue is chosen.</li>
        )}
      </ul>
    </div>
  )
}
