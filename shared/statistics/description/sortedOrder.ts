import { requireFinite } from '../requireFinite.ts'

/** Order-preserving bits of a double: high and low halves as unsigned numbers. */
const PASSES = [0, 11, 22] as const
const RADIX = 2048

/**
 * The positions of the values from smallest to largest, by a radix sort on the doubles' own bits
 * (six passes of 11 bits, passes where all agree left out): linear, and it carries the positions,
 * which a comparison sort of positions would pay for dearly.
 * @throws StatisticsError 'non-finite'
 */
export function sortedOrder(values: Float64Array, what: string): Uint32Array {
  requireFinite(values, what)
  const n = values.length
  const halves = orderedHalves(values)
  let order = new Uint32Array(n)
  for (let i = 0; i < n; i++) order[i] = i
  let spare = new Uint32Array(n)
  const counts = new Uint32Array(RADIX)
  for (const half of [halves.low, halves.high]) {
    for (const shift of PASSES) {
      counts.fill(0)
      for (let i = 0; i < n; i++) counts[(half[i]! >>> shift) & (RADIX - 1)]!++
      if (n > 0 && counts[(half[0]! >>> shift) & (RADIX - 1)] === n) continue
      let position = 0
      for (let digit = 0; digit < RADIX; digit++) {
        const count = counts[digit]!
        counts[digit] = position
        position += count
      }
      for (let i = 0; i < n; i++) {
        const index = order[i]!
        spare[counts[(half[index]! >>> shift) & (RADIX - 1)]!++] = index
      }
      const swap = order
      order = spare
      spare = swap
    }
  }
  return order
}

/** Flips sign bits so that unsigned order equals numeric order; −0 becomes 0 first. */
function orderedHalves(values: Float64Array): { low: Uint32Array; high: Uint32Array } {
  const n = values.length
  const low = new Uint32Array(n)
  const high = new Uint32Array(n)
  const number = new Float64Array(1)
  const bits = new Uint32Array(number.buffer)
  for (let i = 0; i < n; i++) {
    number[0] = values[i]! + 0
    const top = bits[1]!
    const negative = top >>> 31 === 1
    low[i] = negative ? ~bits[0]! : bits[0]!
    high[i] = negative ? ~top : top ^ 0x80000000
  }
  return { low, high }
}
