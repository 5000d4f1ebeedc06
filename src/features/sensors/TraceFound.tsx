import { useMemo, useState } from 'react'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { Button } from '../../ui/Button.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Segments } from '../../ui/Segments.tsx'
import { ExhalationRow } from './ExhalationRow.tsx'
import { gasWords } from './gasWords.ts'
import type { TraceOutcome } from './traceOf.ts'
import { sessionFacts, sessionSentence } from './traceSession.ts'

type TraceFoundProps = {
  found: Extract<TraceOutcome, { refusal: null }>
  /** The gas that somebody looks at; the first where the trace has no such gas. */
  gas: string | null
  onGas: (analyte: string) => void
  provenance: readonly string[]
}

/** A day of breathing has thousands of exhalations. */
const ROWS_AT_ONCE = 12

/** Exhalations, one below the other, and then the session, for one gas at a time. */
export function TraceFound({ found, gas, onGas, provenance }: TraceFoundProps) {
  const { result, curves } = found
  const [rows, setRows] = useState(ROWS_AT_ONCE)
  const at = Math.max(
    0,
    result.analytes.findIndex(({ analyte }) => analyte === gas),
  )
  const session = result.analytes[at]!
  const isInvented = result.recording.instrumentSerial === 'invented'
  const { algorithmVersion } = result
  const standing = useMemo(
    () => [
      ...provenance,
      `Read with version ${algorithmVersion} of the trace algorithm`,
      ...(isInvented ? ['Invented: made from formulas'] : []),
    ],
    [provenance, algorithmVersion, isInvented],
  )
  const hidden = result.exhalations.length - rows
  return (
    <div className="space-y-4">
      {isInvented && (
        <Notice title="This trace is invented">
          It was made from formulas, to try the page with. Nobody breathed it.
        </Notice>
      )}
      {result.analytes.length > 1 && (
        <Segments
          label="Gas"
          options={result.analytes.map(({ analyte }) => ({
            value: analyte,
            label: gasWords(analyte),
          }))}
          value={session.analyte}
          onChange={onGas}
        />
      )}
      {result.exhalations.length === 0 && (
        <EmptyPlace title="No exhalation in this trace">
          CO2 never stays high for long enough: an exhalation reaches 1 % and lasts 1 s or longer.
        </EmptyPlace>
      )}
      {result.exhalations.slice(0, rows).map((exhalation, index) => (
        <ExhalationRow
          key={exhalation.number}
          exhalation={exhalation}
          curve={curves[index]!}
          gasAt={at}
          provenance={standing}
        />
      ))}
      {hidden > 0 && (
        <Button kind="quiet" onClick={() => setRows(rows + ROWS_AT_ONCE)}>
          Show {formatCount(Math.min(hidden, ROWS_AT_ONCE))} more of {formatCount(hidden)}
        </Button>
      )}
      <section>
        <h2>The session's {gasWords(session.analyte).toLowerCase()}</h2>
        {session.valuePpb !== null && (
          <p className="text-3xl font-bold tracking-tight">
            {formatConcentration(session.valuePpb)}{' '}
            <span className="text-base font-normal text-ink-2">ppb</span>
          </p>
        )}
        <p className="mb-3 max-w-[68ch]">{sessionSentence(session)}</p>
        <Facts layout="rows" items={sessionFacts(session)} />
        <p className="mt-3 max-w-[68ch] text-sm text-ink-2">
          {formatCount(result.samples)} samples, {formatConcentration(result.intervalS)} s apart,
          read by version {algorithmVersion} of the trace algorithm; not stored. Limits on flow,
          pressure, duration and slope follow the ATS/ERS 2005 recommendations for exhaled nitric
          oxide; the others are design choices. A study's protocol begins with the same ones.
        </p>
      </section>
    </div>
  )
}
