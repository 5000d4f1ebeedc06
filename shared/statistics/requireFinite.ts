import { StatisticsError } from './StatisticsError.ts'

/**
 * Refuses values that are not finite numbers (missing values have to be left out and counted before).
 * @param what the values' name in the sentence, such as "The sensor values"
 * @throws StatisticsError 'non-finite'
 */
export function requireFinite(values: ArrayLike<number>, what: string): void {
  for (let i = 0; i < values.length; i++) {
    if (!Number.isFinite(values[i])) {
      throw new StatisticsError(
        'non-finite',
        `${what} contain something that is not a finite number (position ${i + 1}).`,
      )
    }
  }
}
