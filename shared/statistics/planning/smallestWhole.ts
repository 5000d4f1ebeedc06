import { StatisticsError } from '../StatisticsError.ts'

/**
 * The smallest whole number from `least` on for which a condition holds that, once true, stays true.
 * @throws StatisticsError 'out-of-range' where it does not hold up to a hundred million
 */
export function smallestWhole(holds: (n: number) => boolean, least: number): number {
  let low = least - 1
  let high = least
  while (!holds(high)) {
    low = high
    high *= 2
    if (high > 1e8) {
      throw new StatisticsError('out-of-range', 'No sample of a practicable size is enough.')
    }
  }
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2)
    if (holds(middle)) high = middle
    else low = middle
  }
  return high
}
