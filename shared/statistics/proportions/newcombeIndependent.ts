import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { wilsonContinuityInterval } from './wilsonContinuityInterval.ts'
import { wilsonInterval } from './wilsonInterval.ts'

export type Proportion = { numerator: number; denominator: number }

export type NewcombeIndependent = {
  /** first − second */
  difference: number
  /** From Wilson limits (method 10, to show) and from those with continuity correction (method 11). */
  method10: Interval
  method11: Interval
  /** For comparison only: too narrow with few subjects and of no width at 0 and 1. */
  wald: Interval
}

/**
 * Difference of two proportions of different subjects.
 * @throws StatisticsError 'out-of-range'
 * Source: Newcombe 1998, Stat Med 17:873.
 */
export function newcombeIndependent(
  first: Proportion,
  second: Proportion,
  { level = 0.95 }: LevelOption = {},
): NewcombeIndependent {
  const p1 = first.numerator / first.denominator
  const p2 = second.numerator / second.denominator
  const limits = (of: typeof wilsonInterval): Interval => {
    const one = of(first.numerator, first.denominator, { level })
    const two = of(second.numerator, second.denominator, { level })
    return {
      lower: p1 - p2 - Math.hypot(p1 - one.lower, two.upper - p2),
      upper: p1 - p2 + Math.hypot(one.upper - p1, p2 - two.lower),
    }
  }
  const method10 = limits(wilsonInterval)
  const half =
    zFor(level) *
    Math.sqrt((p1 * (1 - p1)) / first.denominator + (p2 * (1 - p2)) / second.denominator)
  return {
    difference: p1 - p2,
    method10,
    method11: limits(wilsonContinuityInterval),
    wald: { lower: p1 - p2 - half, upper: p1 - p2 + half },
  }
}
