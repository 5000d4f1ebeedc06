import { formatCount } from '#shared/terms/numbers.ts'
import { Notice } from '../../ui/Notice.tsx'
import type { Refusal } from './csvTable.ts'

type RefusedLinesProps = {
  refused: readonly Refusal[]
  /** How many there are, when more than are named. */
  count?: number
  /** What became of them. */
  consequence: string
}

const MOST_SHOWN = 8

/** Cells that could not be read, by line and column. */
export function RefusedLines({ refused, count = refused.length, consequence }: RefusedLinesProps) {
  if (count === 0) return null
  const shown = refused.slice(0, MOST_SHOWN)
  return (
    <Notice
      tone="warn"
      title={count === 1 ? 'One cell cannot be read' : `${formatCount(count)} cells cannot be read`}
    >
      <p>{consequence}</p>
      <ul className="mt-1.5 space-y-0.5">
        {shown.map(({ line, column, why }) => (
          <li key={`${line} ${column}`}>
            Line {formatCount(line)}, column <span className="font-mono">{column}</span>: {why}
          </li>
        ))}
      </ul>
      {count > shown.length && (
        <p className="mt-1.5">And {formatCount(count - shown.length)} more.</p>
      )}
    </Notice>
  )
}
