import { sortedOrder } from '../description/sortedOrder.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Classes } from './Classes.ts'

/** Each value's placement: the share of the other class that it beats, ties one half. */
export type Placements = {
  area: number
  /** In the order of `present`: 0…1, mean = area. */
  ofPresent: Float64Array
  /** In the order of `absent`: the share of the present that beat this value. */
  ofAbsent: Float64Array
}

/**
 * DeLong's placement values in the order of the input, from one sort of all values.
 * @throws StatisticsError 'one-class', 'non-finite'
 * Source: DeLong, DeLong & Clarke-Pearson 1988; midranks as in Sun & Xu 2014, IEEE Signal Process Lett 21:1389.
 */
export function placements({ present, absent, direction }: Classes): Placements {
  const m = present.length
  const n = absent.length
  if (m === 0 || n === 0) {
    throw new StatisticsError('one-class', 'Both reference outcomes are needed.')
  }
  const values = new Float64Array(m + n)
  const sign = direction === 'higher' ? 1 : -1
  for (let i = 0; i < m; i++) values[i] = sign * present[i]!
  for (let j = 0; j < n; j++) values[m + j] = sign * absent[j]!
  const order = sortedOrder(values, 'The values')
  const ofPresent = new Float64Array(m)
  const ofAbsent = new Float64Array(n)
  let below = 0
  let presentBelow = 0
  let twiceWins = 0
  for (let start = 0; start < order.length; ) {
    const value = values[order[start]!]
    let end = start
    let tiedPresent = 0
    while (end < order.length && values[order[end]!] === value) {
      if (order[end]! < m) tiedPresent++
      end++
    }
    const tiedAbsent = end - start - tiedPresent
    const won = 2 * below + tiedAbsent
    const beaten = 2 * (m - presentBelow) - tiedPresent
    twiceWins += tiedPresent * won
    for (let k = start; k < end; k++) {
      const index = order[k]!
      if (index < m) ofPresent[index] = won / (2 * n)
      else ofAbsent[index - m] = beaten / (2 * m)
    }
    below += tiedAbsent
    presentBelow += tiedPresent
    start = end
  }
  return { area: twiceWins / (2 * m * n), ofPresent, ofAbsent }
}
