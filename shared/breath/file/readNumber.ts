import { decimalValue } from './decimalValue.ts'

const ZERO = 48
const NINE = 57
const POINT = 46
const MINUS = 45
const PLUS = 43
/** Digits that fit 32 bits. */
const FIRST_DIGITS = 9

/**
 * The number in bytes[from, to), exactly as Number() gives it: a plain decimal, with or without an
 * exponent. NaN where it is anything else (empty, hexadecimal, NaN, Infinity, blanks); infinite where
 * it is too large for a double.
 */
export function readNumber(bytes: Uint8Array, from: number, to: number): number {
  let at = from
  const isSigned = at < to && (bytes[at] === MINUS || bytes[at] === PLUS)
  if (isSigned) at++

  const start = at
  let first = 0
  let next = 0
  let significant = 0
  let point = -1
  for (; at < to; at++) {
    const byte = bytes[at]!
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
  }
  const digits = at - start - (point < 0 ? 0 : 1)
  if (digits === 0) return Number.NaN

  let power = point < 0 ? 0 : point + 1 - at
  if (at < to) {
    const exponent = readExponent(bytes, at, to)
    if (Number.isNaN(exponent)) return Number.NaN
    power += exponent
  }
  const size = decimalValue(first, next, significant, power)
  if (Number.isNaN(size)) return Number(String.fromCharCode(...bytes.subarray(from, to)))
  return isSigned && bytes[from] === MINUS ? -size : size
}

/** The exponent that fills bytes[from, to) from its letter on; NaN where that is none. */
function readExponent(bytes: Uint8Array, from: number, to: number): number {
  if ((bytes[from]! | 32) !== 101) return Number.NaN
  let at = from + 1
  const sign = bytes[at]
  if (at < to && (sign === MINUS || sign === PLUS)) at++
  if (at >= to) return Number.NaN
  let size = 0
  for (; at < to; at++) {
    const byte = bytes[at]!
    if (byte < ZERO || byte > NINE) return Number.NaN
    // Beyond this every number is 0 or infinite; the digits themselves need not be kept.
    if (size < 100_000) size = size * 10 + (byte - ZERO)
  }
  return sign === MINUS ? -size : size
}
