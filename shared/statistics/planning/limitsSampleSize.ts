import type { LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { limitsPrecision } from './limitsPrecision.ts'
import { smallestWhole } from './smallestWhole.ts'

/**
 * The smallest number of pairs for which the interval of a limit of agreement has at most a half-width,
 * given as a multiple of the SD of the differences (z·√(3/n)).
 * @param halfWidthSd above 0
 * @throws StatisticsError 'out-of-range'
 * Source: Bland & Altman 1986, Lancet i:307.
 */
export function limitsSampleSize(halfWidthSd: number, options: LevelOption = {}): number {
  if (!(halfWidthSd > 0)) {
    throw new StatisticsError('out-of-range', 'The half-width lies above 0 SD.')
  }
  return smallestWhole((n) => limitsPrecision(n, options).halfWidthSd <= halfWidthSd, 3)
}
