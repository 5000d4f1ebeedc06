import { classes } from '../../ui/classes.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'
import type { PlanAnswer, PlanFigure } from './planQuestion.ts'

/** The answer: its figures in large type, the sentence, and what has to be known beside it. */
export function PlanAnswerView({ answer }: { answer: PlanAnswer }) {
  return (
    <>
      <dl className="mb-3 flex flex-wrap gap-x-8 gap-y-2">
        {answer.figures.map((figure) => (
          <Figure key={figure.label} figure={figure} />
        ))}
      </dl>
      <p className="max-w-[68ch]">{answer.sentence}</p>
      {answer.notes.map((note) => (
        <p key={note} className="mt-2 max-w-[68ch] text-sm text-ink-2">
          {note}
        </p>
      ))}
    </>
  )
}

/** The methods side by side, or the answer for the numbers next to the ones planned. */
export function PlanAnswerTable({ answer }: { answer: PlanAnswer }) {
  const { caption, columns, rows } = answer.table
  return (
    <StaticTable
      caption={caption}
      columns={columns}
      rows={rows.map((cells) => ({ key: cells[0] ?? '', cells }))}
    />
  )
}

function Figure({ figure: { label, value, outcome } }: { figure: PlanFigure }) {
  return (
    <div className="flex flex-col-reverse">
      <dt className="flex items-center gap-1.5 text-sm text-ink-2">
        {outcome && <OutcomeSign outcome={outcome} />}
        {label}
      </dt>
      <dd
        className={classes(
          'text-3xl font-bold tracking-tight',
          outcome === 'present' && 'text-present',
          outcome === 'absent' && 'text-absent',
        )}
      >
        {value}
      </dd>
    </div>
  )
}

/** The signs that the figures use: a filled disc for present, an open diamond for absent. */
function OutcomeSign({ outcome }: { outcome: 'present' | 'absent' }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3 flex-none">
      {outcome === 'present' ? (
        <circle cx="6" cy="6" r="4.5" className="fill-present" />
      ) : (
        <path
          d="M6 1l5 5-5 5-5-5z"
          fill="none"
          className="stroke-absent"
          strokeWidth="1.8"
          strokeLinejoin="round"
        />
      )}
    </svg>
  )
}
