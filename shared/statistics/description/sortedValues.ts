import { StatisticsError } from '../StatisticsError.ts'

/**
 * A copy sorted from smallest to largest; the input is left as it was.
 * @throws StatisticsError 'non-finite'
 */
export function sortedValues(values: ArrayLike<number>, what: string): Float64Array {
  const sorted = Float64Array.from(values)
  for (let i = 0; i < sorted.length; i++) {
    // x − x is 0 for finite numbers only
    if (sorted[i]! - sorted[i]! !== 0) {
      throw new StatisticsError(
        'non-finite',
        `${what} contain something that is not a finite number (position ${i + 1}).`,
      )
    }
  }
  return sorted.sort()
}
