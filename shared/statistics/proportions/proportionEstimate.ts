import type { LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { clopperPearsonInterval } from './clopperPearsonInterval.ts'
import { wilsonInterval } from './wilsonInterval.ts'

export type ProportionMethod = 'Wilson' | 'Clopper–Pearson'

/** A proportion with its counts; without a denominator the three numbers are null and say why. */
export type ProportionEstimate = {
  numerator: number
  denominator: number
  estimate: number | null
  lower: number | null
  upper: number | null
  method: ProportionMethod
  notDefined: NotDefined | null
}

/**
 * A proportion n/N with its interval.
 * @param interval 'Wilson' unless given
 * @throws StatisticsError 'out-of-range' (counts that are not whole, or more than N)
 */
export function proportionEstimate(
  numerator: number,
  denominator: number,
  { level = 0.95, interval = 'Wilson' }: LevelOption & { interval?: ProportionMethod } = {},
): ProportionEstimate {
  const counts = { numerator, denominator, method: interval }
  if (denominator === 0) {
    const sentence = 'Nobody is counted in the denominator, so there is no proportion.'
    const notDefined: NotDefined = { code: 'zero-denominator', sentence }
    return { ...counts, estimate: null, lower: null, upper: null, notDefined }
  }
  const intervalOf = interval === 'Wilson' ? wilsonInterval : clopperPearsonInterval
  const { lower, upper } = intervalOf(numerator, denominator, { level })
  return { ...counts, estimate: numerator / denominator, lower, upper, notDefined: null }
}
