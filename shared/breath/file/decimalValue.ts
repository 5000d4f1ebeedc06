/** Powers of ten that a double holds exactly, and each as a sum of two halves of at most 26 bits. */
const POWERS = Float64Array.from({ length: 23 }, (_, power) => Number(`1e${power}`))
/** 2^27 + 1 cuts a double's digits in halves (Veltkamp). */
const CUT = 134_217_729
const UPPER = POWERS.map((power) => CUT * power - (CUT * power - power))
const LOWER = POWERS.map((power, i) => power - UPPER[i]!)

/** An integer of so many digits is below 2^53. */
const EXACT_DIGITS = 15
const FIRST_DIGITS = 9

/**
 * The double nearest to first·10^k + next, times 10^power, with first of up to nine digits and next of
 * k = significant − 9; exactly what Number() gives. NaN where this way cannot be sure (more than 18
 * digits, powers beyond ±22, large numbers of more than 15 digits, a tie): ask Number() then.
 *
 * Up to 15 digits it is one correctly rounded operation on two exact numbers; up to 18 digits and
 * a negative power it is a quotient in twice the digits, taken where its error cannot reach the rounding.
 * Source: Clinger 1990, How to read floating point numbers accurately (fast case); Dekker 1971,
 * Numer Math 18:224 (doubled precision).
 */
export function decimalValue(
  first: number,
  next: number,
  significant: number,
  power: number,
): number {
  if (power < -22 || power > 22 || significant > 2 * FIRST_DIGITS) return Number.NaN
  // Exact: first·5^k has at most 51 bits.
  const upper = significant > FIRST_DIGITS ? first * POWERS[significant - FIRST_DIGITS]! : first
  if (significant <= EXACT_DIGITS) {
    const whole = upper + next
    return power < 0 ? whole / POWERS[-power]! : whole * POWERS[power]!
  }
  if (power === 0) return upper + next
  return power < 0 ? quotient(upper, next, -power) : Number.NaN
}

/** (upper + lower) / 10^power, rounded once; NaN where the doubled digits leave two answers. */
function quotient(upper: number, lower: number, power: number): number {
  const divisor = POWERS[power]!
  const sum = upper + lower
  const lost = lower - (sum - upper)
  const first = sum / divisor
  // first · divisor = product + error, exactly.
  const product = first * divisor
  const cut = CUT * first
  const firstUpper = cut - (cut - first)
  const firstLower = first - firstUpper
  const error =
    firstUpper * UPPER[power]! -
    product +
    firstUpper * LOWER[power]! +
    firstLower * UPPER[power]! +
    firstLower * LOWER[power]!
  const rest = (sum - product - error + lost) / divisor
  // The rest is known to about 2^−104 of the quotient; ten times as much decides.
  const doubt = first * 2 ** -98
  const least = first + (rest - doubt)
  return least === first + (rest + doubt) ? least : Number.NaN
}
