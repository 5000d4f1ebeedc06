import { StatisticsError } from './StatisticsError.ts'

/**
 * Refuses anything but a whole number of at least `least`.
 * @throws StatisticsError 'out-of-range'
 */
export function requireCount(value: number, what: string, least = 0): void {
  if (!Number.isSafeInteger(value) || value < least) {
    throw new StatisticsError(
      'out-of-range',
      `${what} must be a whole number of at least ${least}.`,
    )
  }
}
