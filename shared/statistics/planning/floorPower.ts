import { regularisedBeta } from '../distributions/regularisedBeta.ts'
import { clopperPearsonInterval } from '../proportions/clopperPearsonInterval.ts'
import type { ProportionMethod } from '../proportions/proportionEstimate.ts'
import { wilsonInterval } from '../proportions/wilsonInterval.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** A proportion that is expected, and the floor that the lower end of its interval has to clear. */
export type FloorPlan = {
  expected: number
  /** Below the expected proportion. */
  floor: number
  /** Two-sided level of the interval, 0.95 unless given. */
  level?: number
  /** Wilson unless given. */
  interval?: ProportionMethod
}

export type FloorPower = {
  /** Fewest positives of n whose interval lies above the floor; n + 1 where none does. */
  least: number
  /** Probability of at least that many. */
  power: number
}

/**
 * Power of a success criterion on one proportion (a sensitivity, or a specificity): the exact binomial
 * probability that the lower end of its interval lies above the floor.
 * @param n subjects of the class, at least 1  @param from where to begin the search, a count known to
 * be not too high (0 unless given): the least count never falls as n grows
 * @throws StatisticsError 'out-of-range'
 * Source: Flahault, Cadilhac & Thomas 2005, J Clin Epidemiol 58:859; Chu & Cole 2007, ibid. 60:1201.
 */
export function floorPower(plan: FloorPlan, n: number, from = 0): FloorPower {
  const { expected, floor, level = 0.95, interval = 'Wilson' } = plan
  requireProbability(expected, 'The proportion expected')
  requireProbability(floor, 'The floor')
  if (floor >= expected) {
    throw new StatisticsError('out-of-range', 'The floor must lie below the proportion expected.')
  }
  requireCount(n, 'The number of subjects', 1)
  const limits = interval === 'Wilson' ? wilsonInterval : clopperPearsonInterval
  let least = from
  while (least <= n && limits(least, n, { level }).lower <= floor) least += 1
  if (least > n) return { least: n + 1, power: 0 }
  // P(X ≥ k) = I(p; k, n − k + 1); k is above 0, because no interval of 0 lies above a floor
  return { least, power: regularisedBeta(expected, 1 - expected, least, n - least + 1).lower }
}
