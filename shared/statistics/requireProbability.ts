import { StatisticsError } from './StatisticsError.ts'

/**
 * Refuses a number that does not lie strictly between 0 and 1.
 * @throws StatisticsError 'out-of-range'
 */
export function requireProbability(value: number, what: string): void {
  if (!(value > 0 && value < 1)) {
    throw new StatisticsError('out-of-range', `${what} must lie between 0 and 1, both left out.`)
  }
}
