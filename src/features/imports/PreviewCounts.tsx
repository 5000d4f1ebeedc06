import type { ReactNode } from 'react'
import type { ImportCounts } from '#shared/schemas/import.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { OUTCOME_LABELS, type Outcome } from '#shared/terms/outcome.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** So many refused rows stand on one page below; only more of them need summing up. */
const MOST_SEEN_AT_ONCE = 20

/** What the check found, in sentences, and why rows are refused. */
export function PreviewCounts({ counts }: { counts: ImportCounts }) {
  return (
    <div className="flex flex-col gap-4">
      <ul className="grid grid-cols-[max-content_1fr] gap-x-3 gap-y-1">
        <Line figure={counts.new} strong>
          {counts.new === 1 ? 'row' : 'rows'} can be entered
          {counts.new > 0 && `, of ${subjectWords(counts.subjects)}`}
          {counts.outcomes && counts.new > 0 && `: ${outcomeWords(counts.outcomes)}`}.
        </Line>
        {counts.severalSessions > 0 && (
          <Line figure={counts.severalSessions}>
            of these subjects have several rows: each row is a session of its own.
          </Line>
        )}
        <Line figure={counts.same}>
          {counts.same === 1 ? 'row is' : 'rows are'} here already with the same values. Nothing is
          left to do for {counts.same === 1 ? 'it' : 'them'}.
        </Line>
        <Line figure={counts.refused}>
          {counts.refused === 1 ? 'row is refused and stays' : 'rows are refused and stay'} out.
        </Line>
      </ul>
      {counts.blanks.length > 0 && (
        <p className="max-w-[80ch] text-ink-2">
          Missing values, kept as missing:{' '}
          {counts.blanks.map(({ column, rows }, index) => (
            <span key={column}>
              {index > 0 && ' · '}
              {column}: {formatCount(rows)}
            </span>
          ))}
        </p>
      )}
      {counts.refused > MOST_SEEN_AT_ONCE && (
        <StaticTable
          caption="Why rows are refused"
          hideCaption={false}
          columns={[{ header: 'Column' }, { header: 'Reason' }, { header: 'Rows', numeric: true }]}
          rows={counts.problems.map(({ column, reason, rows }) => ({
            key: `${column} ${reason}`,
            cells: [column === '' ? 'whole line' : column, reason, formatCount(rows)],
          }))}
        />
      )}
    </div>
  )
}

function Line({
  figure,
  strong = false,
  children,
}: {
  figure: number
  strong?: boolean
  children: ReactNode
}) {
  return (
    <li className="contents">
      <span className={strong ? 'text-right font-bold' : 'text-right'}>{formatCount(figure)}</span>
      <span className={strong ? 'font-semibold' : undefined}>{children}</span>
    </li>
  )
}

const subjectWords = (subjects: number) =>
  subjects === 1 ? 'one subject' : `${formatCount(subjects)} subjects`

const OUTCOME_ORDER: readonly (Outcome | 'missing')[] = [
  'present',
  'absent',
  'indeterminate',
  'notDone',
  'missing',
]

function outcomeWords(outcomes: Record<string, number>): string {
  return OUTCOME_ORDER.filter((outcome) => outcomes[outcome])
    .map((outcome) => {
      const label = outcome === 'missing' ? 'without an outcome' : OUTCOME_LABELS[outcome]
      return `${formatCount(outcomes[outcome] ?? 0)} ${label.toLowerCase()}`
    })
    .join(', ')
}
