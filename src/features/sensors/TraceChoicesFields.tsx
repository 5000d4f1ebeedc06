import { EntryGrid } from '../../forms/EntryGrid.tsx'
import type { EntryProblems } from '../../forms/entries.ts'
import { Segments } from '../../ui/Segments.tsx'
import { TRACE_ENTRIES } from './traceEntries.ts'
import type { TraceChoices } from './traceOf.ts'

export type Picked = Omit<TraceChoices, 'targetFlowMlS' | 'calibrationExpandedPercent'>

type TraceChoicesFieldsProps = {
  picked: Picked
  onPicked: (picked: Picked) => void
  texts: Readonly<Record<string, string>>
  problems: EntryProblems | null
  onText: (name: string, text: string) => void
}

const ADJUSTMENTS = [
  { name: 'normalise', label: 'State the value at 5 % CO2 as well' },
  { name: 'correctDilution', label: 'State it corrected for dilution as well' },
] as const

/** What the protocol says of the subject, the flow and the rule; all else keeps its default. */
export function TraceChoicesFields(props: TraceChoicesFieldsProps) {
  const { picked, onPicked, texts, problems, onText } = props
  return (
    <div className="min-w-0 space-y-4 print:hidden">
      <Segments
        label="Subject"
        options={[
          { value: 'adult', label: 'adult' },
          { value: 'child', label: 'child' },
        ]}
        value={picked.subject}
        onChange={(subject) => onPicked({ ...picked, subject })}
      />
      <Segments
        label="Session's value"
        options={[
          { value: 'median', label: 'median' },
          { value: 'pair', label: 'first two that agree' },
        ]}
        value={picked.sessionRule}
        onChange={(sessionRule) => onPicked({ ...picked, sessionRule })}
      />
      <EntryGrid
        entries={TRACE_ENTRIES}
        names={Object.keys(TRACE_ENTRIES)}
        texts={texts}
        problems={problems}
        onText={onText}
      />
      <div>
        {ADJUSTMENTS.map(({ name, label }) => (
          <label key={name} className="flex min-h-9 items-center gap-2.5">
            <input
              type="checkbox"
              className="size-[18px] accent-spruce"
              checked={picked[name]}
              onChange={(event) => onPicked({ ...picked, [name]: event.target.checked })}
            />
            {label}
          </label>
        ))}
      </div>
    </div>
  )
}
