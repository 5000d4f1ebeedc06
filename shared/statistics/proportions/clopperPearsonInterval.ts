import { betaQuantile } from '../distributions/betaQuantile.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

/**
 * The exact (Clopper–Pearson) interval of a proportion from beta quantiles.
 * @param numerator 0…denominator  @param denominator at least 1
 * @throws StatisticsError 'out-of-range'
 * Source: Clopper & Pearson 1934, Biometrika 26:404.
 */
export function clopperPearsonInterval(
  numerator: number,
  denominator: number,
  { level = 0.95 }: LevelOption = {},
): Interval {
  requireCount(numerator, 'The numerator')
  requireCount(denominator, 'The denominator', 1)
  requireProbability(level, 'The confidence level')
  if (numerator > denominator) {
    throw new StatisticsError('out-of-range', 'The numerator exceeds the denominator.')
  }
  const tail = (1 - level) / 2
  const misses = denominator - numerator
  return {
    lower: numerator === 0 ? 0 : betaQuantile(tail, numerator, misses + 1),
    // by symmetry, so that an upper limit near 1 keeps the digits of its distance from 1
    upper: misses === 0 ? 1 : 1 - betaQuantile(tail, misses, numerator + 1),
  }
}
