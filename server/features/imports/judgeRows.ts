import type { ImportEntry, ImportMapping } from '#shared/schemas/import.ts'
import type { RowFate } from '#shared/terms/importState.ts'
import { compareStored } from './compareStored.ts'
import { type HeadingOf, headings } from './headings.ts'
import type { FoundProblem, ReadRow } from './readCell.ts'
import type { StoredSubject } from './storedSubjects.ts'

/** A row with its fate. A refused one has no entry. */
export type JudgedRow = {
  line: number
  fate: RowFate
  entry: ImportEntry | null
  problems: FoundProblem[]
  blanks: string[]
}

type Numbered = ReadRow & { entry: ImportEntry }

/**
 * Gives every row its fate: it looks at the rows of a subject together, and at what is stored.
 * Where rows contradict each other all of them are refused, since nobody here knows which is right.
 */
export function judgeRows(
  rows: readonly ReadRow[],
  mapping: ImportMapping,
  storedOf: (subjectWord: string) => StoredSubject | undefined,
): JudgedRow[] {
  const heading = headings(mapping)
  const bySubject = numbered(rows)
  for (const group of bySubject.values()) {
    const clean = group.filter((row) => row.problems.length === 0)
    refuseTwins(clean, heading('sessionNumber'))
    refuseContradictions(clean, heading)
  }
  return rows.map((row) => {
    const { line, blanks, problems } = row
    if (problems.length > 0) return { line, blanks, problems, fate: 'refused', entry: null }
    const entry = row.entry as ImportEntry
    const stored = storedOf(entry.subjectWord)
    if (!stored) return { line, blanks, problems, fate: 'new', entry }
    const { contradictions, adds } = compareStored(entry, stored, heading)
    if (contradictions.length > 0)
      return { line, blanks, problems: contradictions, fate: 'refused', entry: null }
    return { line, blanks, problems, fate: adds ? 'new' : 'same', entry }
  })
}

/**
 * The rows of each subject. Where no column numbers the sessions, they count as they stand in the
 * file; a row that is refused keeps its number, so that it fits in when the file comes back mended.
 */
function numbered(rows: readonly ReadRow[]): Map<string, Numbered[]> {
  const bySubject = new Map<string, Numbered[]>()
  for (const row of rows) {
    const { subjectWord } = row.entry
    if (subjectWord === '') continue
    const group = bySubject.get(subjectWord) ?? []
    row.entry.sessionNumber ??= group.length + 1
    group.push(row as Numbered)
    bySubject.set(subjectWord, group)
  }
  return bySubject
}

function refuseTwins(rows: readonly Numbered[], column: string): void {
  const bySession = new Map<number, Numbered[]>()
  for (const row of rows)
    bySession.set(row.entry.sessionNumber, [...(bySession.get(row.entry.sessionNumber) ?? []), row])
  for (const [number, twins] of bySession)
    if (twins.length > 1)
      for (const twin of twins)
        twin.problems.push({
          column,
          reason: `Session ${number} of this subject stands on several lines: ${linesOf(twins)}.`,
          found: String(number),
        })
}

/** What belongs to the subject must be alike on all its lines; a blank says nothing. */
function refuseContradictions(rows: readonly Numbered[], heading: HeadingOf): void {
  if (rows.length < 2) return
  const covariates = new Set(rows.flatMap((row) => Object.keys(row.entry.covariates)))
  const facts: [column: string, of: (entry: ImportEntry) => unknown][] = [
    [heading('site'), (entry) => entry.siteId],
    [heading('sex'), (entry) => entry.sex],
    [heading('ageYears') || heading('ageBand'), (entry) => entry.ageBand],
    [heading('outcome'), (entry) => entry.outcome],
    ...[...covariates].map((key): [string, (entry: ImportEntry) => unknown] => [
      heading('covariate', key),
      (entry) => entry.covariates[key] ?? null,
    ]),
  ]
  for (const [column, of] of facts) {
    const told = rows.filter((row) => of(row.entry) !== null)
    if (new Set(told.map((row) => of(row.entry))).size < 2) continue
    for (const row of rows)
      row.problems.push({
        column,
        reason: `The lines of this subject contradict each other: ${linesOf(told)}.`,
        found: of(row.entry) === null ? null : String(of(row.entry)),
      })
  }
}

function linesOf(rows: readonly { line: number }[]): string {
  const shown = rows.slice(0, 6).map((row) => row.line)
  const more = rows.length > shown.length ? ' and more' : ''
  return `lines ${shown.join(', ')}${more}`
}
