import { LEFT_OUT_LABELS, type LeftOutReason } from '#shared/terms/analysis.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Disclosure } from '../../ui/Disclosure.tsx'

type LeftOutListProps = {
  subjects: number
  counted: number
  leftOut: readonly { reason: LeftOutReason; subjects: number }[]
  /** What else is to be known of those who are counted, as short sentences. */
  notes: readonly string[]
}

/** How many subjects are counted, and each reason why the others are not. */
export function LeftOutList({ subjects, counted, leftOut, notes }: LeftOutListProps) {
  const out = subjects - counted
  return (
    <>
      {formatCount(counted)} of {formatCount(subjects)} subjects
      {notes.map((note) => (
        <p key={note} className="text-ink-2">
          {note}
        </p>
      ))}
      {out > 0 && (
        <div className="mt-1">
          <Disclosure summary={`${formatCount(out)} left out, and why`}>
            <ul className="space-y-1">
              {leftOut.map(({ reason, subjects: many }) => (
                <li key={reason}>
                  <strong className="font-semibold">{formatCount(many)}</strong>{' '}
                  {LEFT_OUT_LABELS[reason]}
                </li>
              ))}
            </ul>
          </Disclosure>
        </div>
      )}
    </>
  )
}
