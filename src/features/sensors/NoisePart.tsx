import { useState } from 'react'
import { EntryField } from '../../forms/EntryField.tsx'
import { type Entry, readEntries } from '../../forms/entries.ts'
import { BesideProgress } from '../../ui/BesideProgress.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { FileDrop } from '../../ui/FileDrop.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Segments } from '../../ui/Segments.tsx'
import { AllanResult } from './AllanResult.tsx'
import { ChoiceField } from './ChoiceField.tsx'
import { unitOf } from './columnHints.ts'
import { RefusedLines } from './RefusedLines.tsx'
import { useSeries } from './useSeries.ts'

const INTERVAL = {
  intervalS: {
    label: 'Between readings',
    unit: 's',
    hint: 'They are evenly spaced',
    start: '1',
    optional: false,
    refuse: (value: number) => (value > 0 ? null : 'Above 0 s, such as 1.'),
  },
} as const satisfies Record<string, Entry>

/** A million readings and more; the file never stands in memory as a whole. */
const MOST_BYTES = 200_000_000

type Estimator = 'overlapping' | 'apart'

/** Allan deviation of a noise series: how long it is worth to average. */
export function NoisePart({ provenance }: { provenance: readonly string[] }) {
  const { head, problem, onFile, onColumn, work } = useSeries()
  const [intervalText, setIntervalText] = useState(INTERVAL.intervalS.start as string)
  const [estimator, setEstimator] = useState<Estimator>('overlapping')
  const { values, problems } = readEntries(INTERVAL, { intervalS: intervalText })
  const outcome = work?.state === 'done' ? work.outcome : null
  return (
    <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.8fr)_minmax(0,1fr)]">
      <div className="min-w-0 space-y-4 print:hidden">
        <FileDrop
          label="Noise series"
          hint="Readings of a steady gas, one a line, under a heading."
          extensions={['.csv', '.txt', '.tsv']}
          maxBytes={MOST_BYTES}
          file={head?.file ?? null}
          onFile={(file) => void onFile(file)}
          {...(problem ? { error: problem } : {})}
        />
        {head && (
          <ChoiceField
            label="Column of the readings"
            value={head.column}
            options={head.headings}
            onChange={onColumn}
          />
        )}
        <EntryField
          entry={INTERVAL.intervalS}
          text={intervalText}
          problem={problems?.intervalS}
          onText={setIntervalText}
        />
        <div>
          <Segments
            label="Averages"
            options={[
              { value: 'overlapping', label: 'overlapping' },
              { value: 'apart', label: 'side by side' },
            ]}
            value={estimator}
            onChange={setEstimator}
          />
          <p className="mt-1 text-sm text-ink-2">
            Overlapping ones use every start: the steadier estimate.
          </p>
        </div>
      </div>
      <div className="min-w-0" aria-live="polite">
        {outcome?.problem === null && head && values ? (
          <AllanResult
            n={outcome.n}
            points={estimator === 'overlapping' ? outcome.overlapping : outcome.apart}
            intervalS={values.intervalS}
            unit={unitOf(head.column)}
            provenance={provenance}
          />
        ) : outcome && outcome.problem !== null ? (
          <>
            <Notice tone="warn" title="Not computed">
              {outcome.problem}
            </Notice>
            <div className="mt-4">
              <RefusedLines
                refused={outcome.refused}
                count={outcome.refusedCount}
                consequence="The series has a gap at each."
              />
            </div>
          </>
        ) : work && work.state !== 'done' ? (
          <BesideProgress label="Reading the series" work={work} />
        ) : (
          <EmptyPlace title="No series yet">
            Drop a file of readings of zero air or of one steady standard. It is read in this
            browser and goes nowhere.
          </EmptyPlace>
        )}
      </div>
    </div>
  )
}
