import { quantile } from '../description/quantile.ts'
import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { allSlopes } from './allSlopes.ts'
import { selectedSlopes } from './selectedSlopes.ts'

/** Null where the rank lies outside the slopes, or the slope there is infinite. */
export type RankEstimate = { estimate: number | null; lower: number | null; upper: number | null }

export type PassingBablokRegression = {
  n: number
  slope: RankEstimate
  intercept: RankEstimate
  /** Slopes used, those below −1, identical points and slopes of −1 left out; ranks of the bounds. */
  slopes: number
  offset: number
  identicalPoints: number
  slopesOfMinusOne: number
  lowerRank: number
  upperRank: number
  notDefined: NotDefined | null
}

/** Counts, and the slopes at given ranks (1 = smallest) among all that count. */
export type SlopeRanks = {
  slopes: number
  offset: number
  identicalPoints: number
  slopesOfMinusOne: number
  at: (ranks: number[]) => number[]
}

/** Up to here all slopes are simply listed and sorted (half a million of them). */
const LISTED_UP_TO = 1000

/**
 * Passing–Bablok regression of y on x: the median of all slopes between points, shifted so that x and y
 * are treated alike, with the bounds' ranks C = z·√(n(n−1)(2n+5)/18), M1 = round((N − C)/2); intercept
 * the median of y − slope·x. Slopes within 1e-9 of −1 count as −1. Beyond 1,000 points ranks are found
 * by counting inversions, O(n log n) in time and O(n) in memory.
 * @param x, y n ≥ 3 finite values, at least two of them different
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant'
 * Source: Passing & Bablok 1983, J Clin Chem Clin Biochem 21:709.
 */
export function passingBablokRegression(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  { level = 0.95 }: LevelOption = {},
): PassingBablokRegression {
  const n = x.length
  if (y.length !== n) throw new StatisticsError('unequal-length', 'Each x needs its y.')
  if (n < 3) throw new StatisticsError('too-few', 'Passing–Bablok needs at least 3 points.')
  requireFinite(x, 'The x values')
  requireFinite(y, 'The y values')
  const xs = Float64Array.from(x)
  const ys = Float64Array.from(y)
  const found = n <= LISTED_UP_TO ? allSlopes(xs, ys) : selectedSlopes(xs, ys)
  const { slopes, offset } = found
  if (slopes === 0) {
    throw new StatisticsError('constant', 'The points give no slope to take a median of.')
  }
  const half = zFor(level) * Math.sqrt((n * (n - 1) * (2 * n + 5)) / 18)
  // + 0: a rank just below 0 must not come out as −0
  const lowerRank = Math.round((slopes - half) / 2) + 0
  const upperRank = slopes - lowerRank + 1
  const middle = slopes % 2 === 1 ? [(slopes + 1) / 2] : [slopes / 2, slopes / 2 + 1]
  const wanted = [...middle, lowerRank, upperRank].map((rank) => rank + offset)
  const inside = wanted.filter((rank) => rank >= 1 && rank <= slopes)
  const values = new Map<number, number>()
  found.at(inside).forEach((slope, k) => {
    values.set(inside[k]!, slope)
  })
  const slopeAt = (rank: number) => finiteOrNull(values.get(rank + offset) ?? null)
  const centre = middle.map(slopeAt)
  const slope: RankEstimate = {
    estimate: centre.includes(null)
      ? null
      : centre.reduce<number>((s, b) => s + b!, 0) / centre.length,
    lower: slopeAt(lowerRank),
    upper: slopeAt(upperRank),
  }
  const intercept: RankEstimate = {
    estimate: interceptFor(xs, ys, slope.estimate),
    lower: interceptFor(xs, ys, slope.upper),
    upper: interceptFor(xs, ys, slope.lower),
  }
  const { identicalPoints, slopesOfMinusOne } = found
  const counts = { slopes, offset, identicalPoints, slopesOfMinusOne, lowerRank, upperRank }
  return { n, slope, intercept, ...counts, notDefined: reason(slope) }
}

function finiteOrNull(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null
}

function interceptFor(x: Float64Array, y: Float64Array, slope: number | null): number | null {
  if (slope === null) return null
  return quantile(y.map((value, i) => value - slope * x[i]!).sort(), 0.5)
}

function reason({ estimate, lower, upper }: RankEstimate): NotDefined | null {
  if (estimate !== null && lower !== null && upper !== null) return null
  const sentence =
    'There are too few slopes (or too many of them vertical) for this part of the line to have a finite value.'
  return { code: 'too-few', sentence }
}
