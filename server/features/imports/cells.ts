import { plainWord } from '#shared/terms/codeWords.ts'
import { type AgeBand, ageBandOf, FIVE_YEAR_BANDS, OPEN_BANDS } from '#shared/terms/subject.ts'

/**
 * A plain number: digits with at most one decimal sign and perhaps an exponent. No thousands
 * separators, no hexadecimal, no infinities. Null for everything else.
 */
export function readNumber(cell: string, decimal: '.' | ','): number | null {
  const pattern =
    decimal === '.'
      ? /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d{1,3})?$/i
      : /^[-+]?(\d+,?\d*|,\d+)(e[-+]?\d{1,3})?$/i
  const text = cell.replace('\u2212', '-')
  if (!pattern.test(text)) return null
  const value = Number(text.replace(',', '.'))
  return Number.isFinite(value) ? value : null
}

const YES = new Set(['1', 'yes', 'y', 'true', 't', 'x'])
const NO = new Set(['0', 'no', 'n', 'false', 'f'])

export function readYesNo(cell: string): boolean | null {
  const word = plainWord(cell)
  if (YES.has(word)) return true
  return NO.has(word) ? false : null
}

/** A five-year band, or one of the open ones, in the usual ways of writing it: 50-54, 50–54, 50 to 54, 90+, ≥90. */
export function readAgeBand(cell: string): AgeBand | null {
  const plain = cell.replace(/\s+/g, '').replace(/–|—|to/g, '-')
  const open = /^(?:≥|>=)(\d{2})$|^(\d{2})\+$/.exec(plain)
  const band = open ? `${open[1] ?? open[2]}+` : plain.replace(/^0(\d)-0(\d)$/, '$1-$2')
  return [...FIVE_YEAR_BANDS, ...OPEN_BANDS].find((each) => each === band) ?? null
}

/** The band of an age; in a file whose ages stop at `andOver`, that age is the open band. */
export function bandOfAge(ageYears: number, andOver: 80 | 85 | null): AgeBand | null {
  if (andOver !== null && ageYears >= andOver) return ageYears === andOver ? `${andOver}+` : null
  return ageBandOf(ageYears)
}
