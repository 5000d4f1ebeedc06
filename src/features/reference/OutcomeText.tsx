import { OUTCOME_LABELS, type Outcome } from '#shared/terms/outcome.ts'

/** The outcome with its mark: filled disc or open diamond, never colour alone. */
export function OutcomeText({ outcome }: { outcome: Outcome | null }) {
  if (outcome === null) return <span className="text-ink-2">not entered</span>
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3 flex-none overflow-visible">
        {outcome === 'present' && <circle cx="6" cy="6" r="5" className="fill-present" />}
        {outcome === 'absent' && (
          <path
            d="M6 .8 11.2 6 6 11.2 .8 6z"
            fill="none"
            strokeWidth="1.6"
            className="stroke-absent"
          />
        )}
        {(outcome === 'indeterminate' || outcome === 'notDone') && (
          <path d="M1.5 6h9" strokeWidth="1.6" className="stroke-ink-2" />
        )}
      </svg>
      {OUTCOME_LABELS[outcome]}
    </span>
  )
}
