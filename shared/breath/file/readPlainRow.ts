import { decimalValue } from './decimalValue.ts'

const NEWLINE = 10
const RETURN = 13
const COMMA = 44
const MINUS = 45
const POINT = 46
const ZERO = 48
const NINE = 57
/** Digits that fit 32 bits, where a multiplication is quickest. */
const FIRST_DIGITS = 9

/**
 * The quick way through a line of plain decimals, which nearly all lines are: reads the numbers from
 * `from` on into `row` and gives the start of the next line. −1 for anything else (blanks, a plus
 * sign, an exponent, more than 18 digits, another number of cells, whatever is wrong): `readRow`
 * then looks at the line with care. Both read the same numbers.
 * @param bytes hold a line feed at or after `from`
 */
export function readPlainRow(bytes: Uint8Array, from: number, row: Float64Array): number {
  const last = row.length - 1
  let at = from
  for (let cell = 0; cell <= last; cell++) {
    let byte = bytes[at]!
    const isNegative = byte === MINUS
    if (isNegative) byte = bytes[++at]!
    const start = at
    let first = 0
    let next = 0
    let significant = 0
    let point = -1
    for (;;) {
      if (byte >= ZERO && byte <= NINE) {
        if (significant < FIRST_DIGITS) {
          first = (Math.imul(first, 10) + byte - ZERO) | 0
          if (first !== 0) significant++
        } else {
          next = (Math.imul(next, 10) + byte - ZERO) | 0
          significant++
        }
      } else if (byte === POINT && point < 0) point = at
      else break
      byte = bytes[++at]!
    }
    if (at - start === (point < 0 ? 0 : 1)) return -1
    const size = decimalValue(first, next, significant, point < 0 ? 0 : point + 1 - at)
    if (Number.isNaN(size)) return -1
    row[cell] = isNegative ? -size : size
    if (cell < last) {
      if (byte !== COMMA) return -1
    } else {
      if (byte === RETURN) byte = bytes[++at]!
      if (byte !== NEWLINE) return -1
    }
    at++
  }
  return at
}
