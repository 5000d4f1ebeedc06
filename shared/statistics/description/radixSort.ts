const DIGITS = 6
const RADIX = 2048

/**
 * Sorts finite doubles, and labels along with them, by their own bits: six passes of 11 bits, from the
 * lowest, those passes left out in which all values agree. Linear, stable, about three times as fast as
 * a comparison sort of a million values; −0 comes just before 0. Needs a little-endian machine, which
 * every one that runs a browser or Node is.
 * @param values, labels are used as working space: their content is undefined afterwards
 * Source: Knuth 1998, The Art of Computer Programming 3, section 5.2.5.
 */
export function radixSort(
  values: Float64Array,
  labels: Uint32Array | null,
): { values: Float64Array; labels: Uint32Array | null } {
  const n = values.length
  const counts = digitCounts(values)
  let from = values
  let to: Float64Array = new Float64Array(n)
  let fromLabels: Uint32Array | null = labels
  let toLabels: Uint32Array | null = labels && new Uint32Array(n)
  for (let digit = 0; digit < DIGITS; digit++) {
    const starts = counts.subarray(digit * RADIX, (digit + 1) * RADIX)
    if (!toStarts(starts, n)) continue
    scatter(digit, starts, from, to, fromLabels, toLabels)
    ;[from, to] = [to, from]
    ;[fromLabels, toLabels] = [toLabels, fromLabels]
  }
  return { values: from, labels: fromLabels }
}

function bitsOf(values: Float64Array): Uint32Array {
  return new Uint32Array(values.buffer, values.byteOffset, 2 * values.length)
}

/** How often each digit occurs in each place, in one pass over the values. */
function digitCounts(values: Float64Array): Uint32Array {
  const bits = bitsOf(values)
  const counts = new Uint32Array(DIGITS * RADIX)
  for (let i = 0; i < bits.length; i += 2) {
    // all bits of a negative number are turned over, of a positive one the sign alone
    const mask = (bits[i + 1]! | 0) >> 31
    const low = bits[i]! ^ mask
    const high = bits[i + 1]! ^ (mask | 0x80000000)
    counts[low & 2047]!++
    counts[RADIX + ((low >>> 11) & 2047)]!++
    counts[2 * RADIX + (low >>> 22)]!++
    counts[3 * RADIX + (high & 2047)]!++
    counts[4 * RADIX + ((high >>> 11) & 2047)]!++
    counts[5 * RADIX + (high >>> 22)]!++
  }
  return counts
}

/** Turns counts into the places where each digit starts; false where one digit holds all. */
function toStarts(counts: Uint32Array, n: number): boolean {
  let start = 0
  for (let digit = 0; digit < RADIX; digit++) {
    const count = counts[digit]!
    if (count === n) return false
    counts[digit] = start
    start += count
  }
  return true
}

function scatter(
  digit: number,
  starts: Uint32Array,
  from: Float64Array,
  to: Float64Array,
  fromLabels: Uint32Array | null,
  toLabels: Uint32Array | null,
): void {
  const bits = bitsOf(from)
  const shift = 11 * (digit % 3)
  const upper = digit >= 3 ? 1 : 0
  const sign = upper === 1 ? 0x80000000 : 0
  for (let i = 0; i < from.length; i++) {
    const mask = ((bits[2 * i + 1]! | 0) >> 31) | sign
    const place = starts[((bits[2 * i + upper]! ^ mask) >>> shift) & 2047]!++
    to[place] = from[i]!
    if (toLabels !== null) toLabels[place] = fromLabels![i]!
  }
}
