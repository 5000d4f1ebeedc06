import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { type LimitOfBlank, limitOfBlank } from '#shared/statistics/sensor/limitOfBlank.ts'
import { KIND_HINT, SIGNAL_HINT, suggestedColumn } from './columnHints.ts'
import { type CsvTable, numbersIn, type Refusal, readCsv } from './csvTable.ts'

/** What somebody gave and chose for blanks and low samples; null is what the file suggests. */
export type BlanksGiven = {
  text: string
  kindColumn: string | null
  signalColumn: string | null
  blankKind: string | null
  lowKind: string | null
}

export type Blanks = {
  table: CsvTable
  kindColumn: string
  signalColumn: string
  kinds: string[]
  blankKind: string
  lowKind: string
  blanks: number[]
  low: number[]
  refused: Refusal[]
}

/** Blank and low readings by what a column says of each. */
export function readBlanks(
  given: BlanksGiven,
): { blanks: Blanks; problem: null } | { blanks: null; problem: string } {
  const read = readCsv(given.text)
  if ('problem' in read) return { blanks: null, problem: read.problem }
  const { table } = read
  const { headings } = table
  const kept = (column: string | null) =>
    column !== null && headings.includes(column) ? column : null
  const kindColumn = kept(given.kindColumn) ?? suggestedColumn(headings, KIND_HINT, 0)
  const signalColumn = kept(given.signalColumn) ?? suggestedColumn(headings, SIGNAL_HINT, -1)
  const place = headings.indexOf(kindColumn)
  const kindOf = (cells: readonly string[]) => (cells[place] ?? '').trim()
  const kinds = [...new Set(table.rows.map(({ cells }) => kindOf(cells)))]
  if (kinds.length > MOST_KINDS)
    return {
      blanks: null,
      problem: `The column "${kindColumn}" has ${kinds.length} different words. Choose the one that tells blank from low.`,
    }
  const suggestedBlank = kinds.find((kind) => /blank|zero/i.test(kind) || Number(kind) === 0)
  const blankKind = keptKind(given.blankKind, kinds) ?? suggestedBlank ?? kinds[0] ?? ''
  const lowKind = keptKind(given.lowKind, kinds) ?? kinds.find((kind) => kind !== blankKind) ?? ''
  const ofKind = (wanted: string) => {
    const rows = table.rows.filter(({ cells }) => kindOf(cells) === wanted)
    return numbersIn({ headings, rows }, [signalColumn])
  }
  const blank = ofKind(blankKind)
  const low = ofKind(lowKind)
  return {
    problem: null,
    blanks: {
      table,
      kindColumn,
      signalColumn,
      kinds,
      blankKind,
      lowKind,
      blanks: blank.rows.map((row) => row[0]!),
      low: low.rows.map((row) => row[0]!),
      refused: [...blank.refused, ...low.refused].sort((a, b) => a.line - b.line),
    },
  }
}

/** More than these are values, not kinds. */
const MOST_KINDS = 20

const keptKind = (kind: string | null, kinds: readonly string[]) =>
  kind !== null && kinds.includes(kind) ? kind : null

/** Limits of blank and of detection, or what to do about a refusal. */
export function blankLimitsOf({
  blanks,
  low,
  blankKind,
  lowKind,
}: Pick<Blanks, 'blanks' | 'low' | 'blankKind' | 'lowKind'>):
  | { limits: LimitOfBlank; problem: null }
  | { limits: null; problem: string } {
  if (blankKind === lowKind)
    return { limits: null, problem: 'Blank and low are the same word. Choose two.' }
  try {
    return { limits: limitOfBlank(blanks, low), problem: null }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    return { limits: null, problem: `${error.message} Give more, or choose other words.` }
  }
}
