/**
 * How numbers and instants are written, in one place, so that the screen, the file and the printed
 * page show the same characters. Minus is U+2212; thousands carry a comma; digits are tabular.
 */
const MINUS = '−'
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** What stands where no number can be given. */
export const NOT_ESTIMABLE = 'not estimable'

/** An estimate to a fixed number of decimals; null is said in words, infinity too. */
export function formatEstimate(value: number | null | undefined, decimals = 3): string {
  if (value === null || value === undefined || Number.isNaN(value)) return NOT_ESTIMABLE
  return fixed(value, decimals, decimals)
}

/** "0.781 to 0.889"; "not estimable" where a bound is missing. */
export function formatInterval(
  lower: number | null | undefined,
  upper: number | null | undefined,
  decimals = 3,
): string {
  const bounds = [formatEstimate(lower, decimals), formatEstimate(upper, decimals)]
  return bounds.includes(NOT_ESTIMABLE) ? NOT_ESTIMABLE : bounds.join(' to ')
}

/** "17,978". @throws RangeError when the value is not a whole number */
export function formatCount(value: number): string {
  if (!Number.isInteger(value)) throw new RangeError(`A count must be a whole number, not ${value}`)
  return fixed(value, 0, 0)
}

/** "64/77", or "1,204/17,978". */
export function formatFraction(numerator: number, denominator: number): string {
  return `${formatCount(numerator)}/${formatCount(denominator)}`
}

/**
 * A measured value to at most the given number of significant digits, without trailing zeros. Digits
 * before the decimal point are never rounded away: 17,978 stays 17,978, because a cut-off must be
 * readable as it was applied.
 */
export function formatConcentration(value: number, significantDigits = 4): string {
  if (value === 0 || !Number.isFinite(value)) return fixed(value, 0, 0)
  const integerDigits = Math.floor(Math.log10(Math.abs(value))) + 1
  return fixed(value, 0, Math.min(20, Math.max(0, significantDigits - integerDigits)))
}

/** "83.1 %" from the proportion 0.831. */
export function formatPercent(proportion: number, decimals = 1): string {
  return `${fixed(proportion * 100, decimals, decimals)} %`
}

/** A p value: "0.042", and "< 0.001" where three decimals would show nothing. */
export function formatProbability(p: number): string {
  return p < 0.001 ? '< 0.001' : fixed(p, 3, 3)
}

/** "14 Oct 2026 11:52 UTC". @throws RangeError when the text is no instant */
export function formatInstant(utcIso: string): string {
  const iso = new Date(utcIso).toISOString()
  return `${formatDate(iso)} ${iso.slice(11, 16)} UTC`
}

/** "14 Oct 2026", the UTC day. @throws RangeError when the text is no date */
export function formatDate(utcIso: string): string {
  const date = new Date(utcIso)
  if (Number.isNaN(date.getTime())) throw new RangeError('Not a date')
  return `${date.getUTCDate()} ${MONTHS[date.getUTCMonth()]} ${date.getUTCFullYear()}`
}

/** Formatters are dear to make and cheap to keep: one for each pair of decimals. */
const formatters = new Map<string, Intl.NumberFormat>()

function fixed(value: number, minimumFractionDigits: number, maximumFractionDigits: number) {
  if (!Number.isFinite(value)) return `${value < 0 ? MINUS : ''}infinite`
  const key = `${minimumFractionDigits} ${maximumFractionDigits}`
  let formatter = formatters.get(key)
  if (!formatter) {
    formatter = new Intl.NumberFormat('en-GB', { minimumFractionDigits, maximumFractionDigits })
    formatters.set(key, formatter)
  }
  const text = formatter.format(value)
  // A small negative number that rounds to nought carries no sign.
  return /[1-9]/.test(text) ? text.replace('-', MINUS) : text.replace('-', '')
}
