import { StatisticsError } from './StatisticsError.ts'

/** Fourth powers of larger numbers, which variances of variances need, leave the range of a double. */
const LARGEST = 1e60

/**
 * Refuses values that are not finite numbers (missing values have to be left out and counted before), or
 * so large that no reading can be.
 * @param what the values' name in the sentence, such as "The sensor values"
 * @throws StatisticsError 'non-finite'
 */
export function requireFinite(values: ArrayLike<number>, what: string): void {
  for (let i = 0; i < values.length; i++) {
    // a comparison with NaN is false as well
    if (!(Math.abs(values[i]!) < LARGEST)) {
      throw new StatisticsError(
        'non-finite',
        `${what} contain something that is not a finite number below 1e60 (position ${i + 1}).`,
      )
    }
  }
}
