import { StatisticsError } from '../StatisticsError.ts'

/**
 * Holm's step-down adjustment where more than one biomarker is primary: p values that keep the chance
 * of any false claim at the level.
 * @param pValues each 0…1; the answer keeps their order
 * @throws StatisticsError 'out-of-range'
 * Source: Holm 1979, Scand J Stat 6:65.
 */
export function holmAdjustment(pValues: ArrayLike<number>): number[] {
  const values = Array.from(pValues)
  if (!values.every((p) => p >= 0 && p <= 1)) {
    throw new StatisticsError('out-of-range', 'A p value lies between 0 and 1.')
  }
  const order = values.map((_, i) => i).sort((a, b) => values[a]! - values[b]!)
  const adjusted = new Array<number>(values.length).fill(0)
  let largest = 0
  order.forEach((index, rank) => {
    largest = Math.max(largest, Math.min(1, (values.length - rank) * values[index]!))
    adjusted[index] = largest
  })
  return adjusted
}
