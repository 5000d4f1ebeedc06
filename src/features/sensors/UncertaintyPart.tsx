import { useId, useState } from 'react'
import type { ExpandedUncertainty } from '#shared/statistics/sensor/expandedUncertainty.ts'
import { formatConcentration, formatPercent } from '#shared/terms/numbers.ts'
import { EntryGrid } from '../../forms/EntryGrid.tsx'
import { readEntries } from '../../forms/entries.ts'
import { FieldHint, FieldMessage } from '../../forms/FieldFrame.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { BUDGET_ENTRIES, readExhalations, uncertaintyOf } from './uncertaintyOf.ts'

/** Expanded uncertainty of a session's mean, part by part. */
export function UncertaintyPart() {
  const id = useId()
  const [exhalations, setExhalations] = useState('310 325 318')
  const [texts, setTexts] = useState<Record<string, string>>({})
  const read = readExhalations(exhalations)
  const { values, problems } = readEntries(BUDGET_ENTRIES, texts)
  const worked = read.values && values ? uncertaintyOf(read.values, values) : null
  const problem = read.problem ?? worked?.problem ?? null
  return (
    <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.9fr)_minmax(0,1fr)]">
      <div className="min-w-0 space-y-5 print:hidden">
        <div>
          <label htmlFor={id} className="block text-[14px] font-semibold">
            Values of one session
          </label>
          <FieldHint
            id={id}
            hint="One for each exhalation that counts, apart by spaces; all in one unit. These are invented."
          />
          <FieldMessage id={id} message={problem ?? undefined} />
          <textarea
            id={id}
            rows={2}
            spellCheck={false}
            value={exhalations}
            aria-invalid={problem ? true : undefined}
            aria-describedby={problem ? `${id}-error ${id}-hint` : `${id}-hint`}
            onChange={(event) => setExhalations(event.target.value)}
            className="control mt-1.5 max-w-md"
          />
        </div>
        <EntryGrid
          entries={BUDGET_ENTRIES}
          names={Object.keys(BUDGET_ENTRIES)}
          texts={texts}
          problems={problems}
          onText={(name, text) => setTexts({ ...texts, [name]: text })}
        />
      </div>
      <div className="min-w-0" aria-live="polite">
        {worked?.found ? (
          <Budget found={worked.found} />
        ) : (
          <Notice tone="warn" title="No answer yet">
            Mend the numbers that are marked on this page.
          </Notice>
        )}
      </div>
    </div>
  )
}

function Budget({ found }: { found: ExpandedUncertainty }) {
  const parts: [string, number][] = [
    ['Spread, s/√n', found.repeatability],
    ['Calibration', found.calibration],
    ['Step of the display', found.resolution],
    ['Drift', found.drift],
    ['Room air', found.ambient],
  ]
  const variance = found.combined ** 2
  return (
    <>
      <h2>
        {formatConcentration(found.value)} ± {formatConcentration(found.expanded, 3)}{' '}
        <span className="font-normal text-ink-2">(k = {formatConcentration(found.coverage)})</span>
      </h2>
      <StaticTable
        caption="Parts of the uncertainty"
        columns={[
          { header: 'Part' },
          { header: 'Standard uncertainty', numeric: true },
          { header: 'Share of the variance', numeric: true },
        ]}
        rows={[
          ...parts.map(([name, part]) => ({
            key: name,
            cells: [
              name,
              formatConcentration(part),
              variance === 0 ? 'none' : formatPercent(part ** 2 / variance),
            ],
          })),
          {
            key: 'combined',
            cells: [
              <strong key="name">Combined</strong>,
              <strong key="part">{formatConcentration(found.combined)}</strong>,
              '',
            ],
          },
        ]}
      />
      <p className="mt-2 text-sm text-ink-2">
        {found.degreesOfFreedom === null
          ? 'The exhalations do not differ, so their spread adds nothing.'
          : `Effective degrees of freedom: ${formatConcentration(found.degreesOfFreedom, 3)}.`}{' '}
        The calibration is shared by all sessions: averaging over subjects does not make it smaller.
      </p>
    </>
  )
}
