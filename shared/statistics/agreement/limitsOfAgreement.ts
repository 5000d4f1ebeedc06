import type { LevelOption } from '../Interval.ts'
import { type LimitsOfDifferences, limitsOfDifferences } from './limitsOfDifferences.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

/**
 * Bland–Altman bias and limits of agreement; difference = first − second, in the pairs' unit.
 * @param pairs n ≥ 3 pairs, both in one unit
 * @throws StatisticsError 'different-units', 'unequal-length', 'too-few', 'non-finite'
 * Source: see limitsOfDifferences.
 */
export function limitsOfAgreement(
  pairs: Pairs,
  options: LevelOption & { coverage?: number } = {},
): LimitsOfDifferences {
  requirePairs(pairs, 3)
  const { first, second } = pairs
  return limitsOfDifferences(
    Float64Array.from(first, (value, i) => value - second[i]!),
    options,
  )
}
