export type NumberReading =
  | { value: number | undefined; problem?: undefined }
  | { value?: undefined; problem: string }

const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i
const GROUPED_BY_SPACES = /^[+-]?\d{1,3}( \d{3})+(\.\d+)?$/

/**
 * Reads what somebody typed. Blank is no value, never 0. A comma is refused, because "1,180" is
 * about a thousand to one reader and about one to another.
 */
export function readNumber(text: string): NumberReading {
  const typed = text.trim()
  if (typed === '') return { value: undefined }
  const cleaned = typed.replaceAll('−', '-').replace(/[\u00a0\u2009\u202f]/g, ' ')
  if (cleaned.includes(',')) return { problem: commaProblem(typed) }
  const joined = GROUPED_BY_SPACES.test(cleaned) ? cleaned.replaceAll(' ', '') : cleaned
  if (!PLAIN_NUMBER.test(joined)) {
    return { problem: `"${typed}" is not a number. Write digits only, such as 12.5.` }
  }
  const value = Number(joined)
  return Number.isFinite(value) ? { value } : { problem: `"${typed}" is too large a number.` }
}

function commaProblem(typed: string): string {
  const oneCommaThenThree = /^[+-]?[1-9]\d{0,2},\d{3}$/.test(typed)
  if (oneCommaThenThree) {
    return `"${typed}" can be read in two ways. Write ${typed.replace(',', '')} or ${typed.replace(',', '.')}.`
  }
  return `Write "${typed}" without a comma: a point for decimals, nothing between thousands.`
}
