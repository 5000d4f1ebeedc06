import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Pairs } from './Pairs.ts'

/**
 * Refuses pairs that cannot be compared.
 * @throws StatisticsError 'different-units', 'unequal-length', 'too-few', 'non-finite'
 */
export function requirePairs(pairs: Pairs, least: number): void {
  const { first, second, firstUnit, secondUnit } = pairs
  if (firstUnit !== undefined && secondUnit !== undefined && firstUnit !== secondUnit) {
    throw new StatisticsError(
      'different-units',
      `One is in ${firstUnit}, the other in ${secondUnit}: agreement has no meaning there; use rank correlation.`,
    )
  }
  if (first.length !== second.length) {
    throw new StatisticsError('unequal-length', 'Each value needs its partner.')
  }
  if (first.length < least) {
    throw new StatisticsError(
      'too-few',
      `At least ${least} complete pairs are needed; there are ${first.length}.`,
    )
  }
  requireFinite(first, 'The first measurements')
  requireFinite(second, 'The second measurements')
}
