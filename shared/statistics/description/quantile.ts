import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

/**
 * The p-quantile by linear interpolation between order statistics (type 7 of Hyndman & Fan).
 * @param sorted at least one finite value, smallest first  @param p 0…1
 * @throws StatisticsError 'too-few', 'out-of-range', 'non-finite'
 * Source: Hyndman & Fan 1996, Am Stat 50:361.
 */
export function quantile(sorted: ArrayLike<number>, p: number): number {
  if (sorted.length === 0) throw new StatisticsError('too-few', 'There are no values.')
  if (!(p >= 0 && p <= 1)) throw new StatisticsError('out-of-range', 'A share lies in 0…1.')
  const position = (sorted.length - 1) * p
  const below = Math.floor(position)
  const low = sorted[below]!
  const high = sorted[Math.min(below + 1, sorted.length - 1)]!
  requireFinite([low, high], 'The values')
  return low + (position - below) * (high - low)
}
