const ZERO = 48
const NINE = 57
const POINT = 46
const MINUS = 45
const PLUS = 43

/** Powers of ten that a double holds exactly. */
const EXACT_POWERS = Float64Array.from({ length: 23 }, (_, power) => Number(`1e${power}`))

/** Any integer of so many digits is below 2^53 and so held exactly. */
const EXACT_DIGITS = 15

/**
 * The number in bytes[from, to), exactly as Number() gives it: a plain decimal, with or without an
 * exponent. NaN where it is anything else (empty, hexadecimal, NaN, Infinity, blanks); infinite where
 * it is too large for a double.
 *
 * Up to 15 digits and a power of ten up to 22 are one correctly rounded multiplication or division
 * of two exact numbers; the rare rest goes through Number().
 * Source: Clinger 1990, How to read floating point numbers accurately (the fast case).
 */
export function readNumber(bytes: Uint8Array, from: number, to: number): number {
  let at = from
  const sign = bytes[at]
  if (at < to && (sign === MINUS || sign === PLUS)) at++

  let mantissa = 0
  let significant = 0
  let digits = 0
  let decimals = 0
  let byte = 0
  for (; at < to; at++) {
    byte = bytes[at]!
    if (byte < ZERO || byte > NINE) break
    mantissa = mantissa * 10 + (byte - ZERO)
    if (mantissa !== 0) significant++
    digits++
  }
  if (at < to && byte === POINT) {
    for (at++; at < to; at++) {
      byte = bytes[at]!
      if (byte < ZERO || byte > NINE) break
      mantissa = mantissa * 10 + (byte - ZERO)
      if (mantissa !== 0) significant++
      digits++
      decimals++
    }
  }
  if (digits === 0) return Number.NaN

  let power = -decimals
  if (at < to) {
    const exponent = readExponent(bytes, at, to)
    if (Number.isNaN(exponent)) return Number.NaN
    power += exponent
  }

  if (significant > EXACT_DIGITS || power < -22 || power > 22) {
    return Number(String.fromCharCode(...bytes.subarray(from, to)))
  }
  const size = power < 0 ? mantissa / EXACT_POWERS[-power]! : mantissa * EXACT_POWERS[power]!
  return sign === MINUS ? -size : size
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
