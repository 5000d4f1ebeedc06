const NEWLINE = 10
const RETURN = 13
const COMMA = 44
const MINUS = 45
const POINT = 46
const ZERO = 48

/** Integers of so many digits fit 32 bits, where a multiplication is quickest. */
const MOST_DIGITS = 9
const POWERS = Float64Array.from({ length: MOST_DIGITS + 1 }, (_, power) => 10 ** power)

/**
 * The quick way through a line of plain short decimals, which nearly all lines are: reads the numbers
 * from `from` on into `row` and gives the start of the next line. −1 for anything else (blanks, more
 * than nine digits, an exponent, another number of cells, whatever is wrong): `readRow` then looks
 * at the line with care. Both read the same numbers: an integer divided by a power of ten, both exact,
 * is rounded once, as Number() does.
 * @param bytes hold a line feed at or after `from`
 */
export function readPlainRow(bytes: Uint8Array, from: number, row: Float64Array): number {
  const last = row.length - 1
  let at = from
  let byte = 0
  for (let cell = 0; cell <= last; cell++) {
    byte = bytes[at]!
    const isNegative = byte === MINUS
    if (isNegative) byte = bytes[++at]!
    let mantissa = 0
    let digits = at
    let decimals = 0
    while (byte >= ZERO && byte <= ZERO + 9) {
      mantissa = (Math.imul(mantissa, 10) + byte - ZERO) | 0
      byte = bytes[++at]!
    }
    digits = at - digits
    if (byte === POINT) {
      decimals = ++at
      byte = bytes[at]!
      while (byte >= ZERO && byte <= ZERO + 9) {
        mantissa = (Math.imul(mantissa, 10) + byte - ZERO) | 0
        byte = bytes[++at]!
      }
      decimals = at - decimals
      digits += decimals
    }
    if (digits === 0 || digits > MOST_DIGITS) return -1
    if (cell < last) {
      if (byte !== COMMA) return -1
    } else {
      if (byte === RETURN) byte = bytes[++at]!
      if (byte !== NEWLINE) return -1
    }
    at++
    const size = mantissa / POWERS[decimals]!
    row[cell] = isNegative ? -size : size
  }
  return at
}
