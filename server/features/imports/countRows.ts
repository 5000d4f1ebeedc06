import type { ImportCounts, ImportMapping } from '#shared/schemas/import.ts'
import type { JudgedRow } from './judgeRows.ts'

const MOST_PROBLEMS_LISTED = 50

/** What the preview says in numbers. */
export function countRows(rows: readonly JudgedRow[], mapping: ImportMapping): ImportCounts {
  const fresh = rows.filter((row) => row.fate === 'new')
  const perSubject = new Map<string, { rows: number; outcome: string | null }>()
  for (const { entry } of fresh) {
    const subject = perSubject.get(entry!.subjectWord) ?? { rows: 0, outcome: null }
    subject.rows += 1
    subject.outcome ??= entry!.outcome
    perSubject.set(entry!.subjectWord, subject)
  }
  const outcomes = mapping.columns.some((column) => column.meaning.as === 'outcome')
    ? tally([...perSubject.values()].map((subject) => subject.outcome ?? 'missing'))
    : null
  const problems = tally(
    rows.flatMap((row) => [
      ...new Set(row.problems.map(({ column, reason }) => JSON.stringify([column, kind(reason)]))),
    ]),
  )
  return {
    rows: rows.length,
    new: fresh.length,
    same: rows.filter((row) => row.fate === 'same').length,
    refused: rows.filter((row) => row.fate === 'refused').length,
    subjects: perSubject.size,
    severalSessions: [...perSubject.values()].filter((subject) => subject.rows > 1).length,
    outcomes: outcomes && Object.fromEntries(outcomes),
    blanks: tally(fresh.flatMap((row) => row.blanks)).map(([column, count]) => ({
      column,
      rows: count,
    })),
    problems: problems.slice(0, MOST_PROBLEMS_LISTED).map(([key, count]) => {
      const [column, reason] = JSON.parse(key) as [string, string]
      return { column, reason, rows: count }
    }),
    entered: null,
  }
}

/** Reasons of one kind are counted together: without the numbers of lines and sessions in them. */
const kind = (reason: string) =>
  reason
    .replace(/: lines? [\d, ]+(and more)?\.$/, '.')
    .replace(/^Session \d+ of/, 'A session of')
    .replace(/^The line has \d+ cells/, 'The line has more or fewer cells')

function tally(words: readonly string[]): [string, number][] {
  const counts = new Map<string, number>()
  for (const word of words) counts.set(word, (counts.get(word) ?? 0) + 1)
  return [...counts].toSorted((a, b) => b[1] - a[1])
}
