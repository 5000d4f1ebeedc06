import type { Interval, LevelOption } from '../Interval.ts'
import { requireCount } from '../requireCount.ts'
import type { PairedCounts } from './PairedCounts.ts'
import { wilsonInterval } from './wilsonInterval.ts'

export type NewcombePaired = {
  /** Share positive by the first test less share positive by the second. */
  difference: number
  /** Score limits with φ as it is (method 8), and with φ corrected for continuity (method 10, to show). */
  method8: Interval
  method10: Interval
}

/**
 * Difference of two proportions of the same subjects.
 * @param counts whole, at least one subject
 * @throws StatisticsError 'out-of-range'
 * Source: Newcombe 1998, Stat Med 17:2635, methods 8 and 10.
 */
export function newcombePaired(
  counts: PairedCounts,
  { level = 0.95 }: LevelOption = {},
): NewcombePaired {
  const { bothPositive: a, firstOnly: b, secondOnly: c, bothNegative: d } = counts
  for (const count of [a, b, c, d]) requireCount(count, 'Each count')
  const n = a + b + c + d
  requireCount(n, 'The number of subjects', 1)
  const p1 = (a + b) / n
  const p2 = (a + c) / n
  const one = wilsonInterval(a + b, n, { level })
  const two = wilsonInterval(a + c, n, { level })
  const difference = (b - c) / n
  const limits = (phi: number): Interval => ({
    lower: difference - joined(p1 - one.lower, two.upper - p2, phi),
    upper: difference + joined(one.upper - p1, p2 - two.lower, phi),
  })
  const cross = a * d - b * c
  const margins = Math.sqrt((a + b) * (c + d) * (a + c) * (b + d))
  const corrected = cross > 0 ? Math.max(0, cross - n / 2) : cross
  const phi = (numerator: number) => (margins === 0 ? 0 : numerator / margins)
  return { difference, method8: limits(phi(cross)), method10: limits(phi(corrected)) }
}

function joined(first: number, second: number, phi: number): number {
  return Math.sqrt(Math.max(0, first * first - 2 * phi * first * second + second * second))
}
