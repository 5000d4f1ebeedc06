import type { LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type LimitsOfDifferences, limitsOfDifferences } from './limitsOfDifferences.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

/**
 * Limits of agreement of the difference in percent of the pair's mean, 100·(first − second)/mean.
 * @param pairs n ≥ 3 pairs in one unit, no pair with a mean of 0
 * @throws StatisticsError as limitsOfAgreement, and 'not-positive' (a mean of 0 or less)
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135; Pollock et al 1992, Ann Clin Biochem 29:556.
 */
export function percentLimits(
  pairs: Pairs,
  options: LevelOption & { coverage?: number } = {},
): LimitsOfDifferences {
  requirePairs(pairs, 3)
  const { first, second } = pairs
  const percent = Float64Array.from(first, (value, i) => {
    const mean = (value + second[i]!) / 2
    if (mean <= 0) {
      throw new StatisticsError(
        'not-positive',
        `Percent of the mean needs a mean above 0; pair ${i + 1} has none.`,
      )
    }
    return (100 * (value - second[i]!)) / mean
  })
  return limitsOfDifferences(percent, options)
}
