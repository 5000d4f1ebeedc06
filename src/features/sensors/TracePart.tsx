import { useState } from 'react'
import { defaultSettings } from '#shared/breath/settings/defaultSettings.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { readEntries } from '../../forms/entries.ts'
import { BesideProgress } from '../../ui/BesideProgress.tsx'
import { Caution } from '../../ui/Caution.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { type Picked, TraceChoicesFields } from './TraceChoicesFields.tsx'
import { TraceFound } from './TraceFound.tsx'
import { TraceInput } from './TraceInput.tsx'
import { TRACE_ENTRIES } from './traceEntries.ts'
import { useTrace } from './useTrace.ts'

const FIRST: Picked = {
  subject: defaultSettings.subject,
  sessionRule: defaultSettings.sessionRule,
  normalise: false,
  correctDilution: false,
}

/** A breath trace read beside the page: its exhalations, their verdicts and the session's value. */
export function TracePart({ provenance }: { provenance: readonly string[] }) {
  const [picked, setPicked] = useState(FIRST)
  const [texts, setTexts] = useState<Record<string, string>>({})
  const { values, problems } = readEntries(TRACE_ENTRIES, texts)
  const trace = useTrace(values && { ...picked, ...values })
  const shortestS =
    picked.subject === 'child' ? defaultSettings.shortestChildS : defaultSettings.shortestS
  return (
    <div className="space-y-6">
      <Caution title="Stop at once if the subject is breathless, dizzy, in pain or asks to.">
        A steady breath out, at least {shortestS} s. Local policy and licensed clinicians decide;
        nothing here may guide a person's care.
      </Caution>
      <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-2">
        <TraceInput
          file={trace.file}
          text={trace.text}
          onFile={trace.onFile}
          onText={trace.onText}
        />
        <TraceChoicesFields
          picked={picked}
          onPicked={setPicked}
          texts={texts}
          problems={problems}
          onText={(name, text) => setTexts({ ...texts, [name]: text })}
        />
      </div>
      <div className="min-w-0" aria-live="polite">
        <TraceState work={trace.work} isReady={values !== null} provenance={provenance} />
      </div>
    </div>
  )
}

type TraceStateProps = {
  work: ReturnType<typeof useTrace>['work']
  isReady: boolean
  provenance: readonly string[]
}

function TraceState({ work, isReady, provenance }: TraceStateProps) {
  // Stays while a trace is read anew for another choice.
  const [gas, setGas] = useState<string | null>(null)
  if (!isReady)
    return (
      <Notice tone="warn" title="Not read yet">
        Mend the numbers that are marked on this page.
      </Notice>
    )
  if (!work)
    return (
      <EmptyPlace title="No trace yet">
        Drop a file with time, CO2 and at least one gas. It is read in this browser, goes nowhere
        and is not stored.
      </EmptyPlace>
    )
  if (work.state !== 'done') return <BesideProgress label="Reading the trace" work={work} />
  const { outcome } = work
  if (outcome.refusal === null)
    return <TraceFound found={outcome} gas={gas} onGas={setGas} provenance={provenance} />
  const { line, column, reason } = outcome.refusal
  return (
    <Notice tone="stop" title="This cannot be read as a breath trace">
      <p>
        Line {formatCount(line)}, column {formatCount(column)}: {reason}
      </p>
      <p className="mt-1">Nothing of it was used. Mend it and give it again.</p>
    </Notice>
  )
}
