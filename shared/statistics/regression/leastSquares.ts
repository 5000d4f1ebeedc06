import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type LeastSquares = {
  n: number
  intercept: number
  slope: number
  interceptStandardError: number
  slopeStandardError: number
  covariance: number
  interceptInterval: Interval
  slopeInterval: Interval
  /** √(Σ w e²/(n − 2)), in units of y·√w. */
  residualSd: number
  degreesOfFreedom: number
  /** 1 − RSS/TSS, weighted, about the weighted mean. */
  rSquared: number
  /** Weighted means and Σ w (x − mean)². */
  meanX: number
  meanY: number
  sumSquaresX: number
}

/**
 * A straight line by ordinary or weighted least squares; intervals by t(n − 2).
 * @param x, y n ≥ 3 finite values of one length, x not all equal  @param weights positive, or none
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant', 'not-positive'
 * Source: Draper & Smith 1998, Applied Regression Analysis, ch. 1 and 9.
 */
export function leastSquares(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  weights?: ArrayLike<number>,
  { level = 0.95 }: LevelOption = {},
): LeastSquares {
  const n = x.length
  requireUsable(x, y, weights)
  const w = (i: number): number => (weights ? weights[i]! : 1)
  let sumW = 0
  let sumX = 0
  let sumY = 0
  for (let i = 0; i < n; i++) {
    sumW += w(i)
    sumX += w(i) * x[i]!
    sumY += w(i) * y[i]!
  }
  const meanX = sumX / sumW
  const meanY = sumY / sumW
  let xx = 0
  let xy = 0
  let yy = 0
  for (let i = 0; i < n; i++) {
    const dx = x[i]! - meanX
    const dy = y[i]! - meanY
    xx += w(i) * dx * dx
    xy += w(i) * dx * dy
    yy += w(i) * dy * dy
  }
  if (xx === 0) throw new StatisticsError('constant', 'All x are equal, so there is no slope.')
  const slope = xy / xx
  const intercept = meanY - slope * meanX
  let rss = 0
  for (let i = 0; i < n; i++) rss += w(i) * (y[i]! - meanY - slope * (x[i]! - meanX)) ** 2
  const degreesOfFreedom = n - 2
  const variance = rss / degreesOfFreedom
  const slopeStandardError = Math.sqrt(variance / xx)
  const interceptStandardError = Math.sqrt(variance * (1 / sumW + (meanX * meanX) / xx))
  const t = studentTQuantile(1 - (1 - level) / 2, degreesOfFreedom)
  return {
    n,
    intercept,
    slope,
    interceptStandardError,
    slopeStandardError,
    covariance: (-variance * meanX) / xx,
    interceptInterval: around(intercept, t * interceptStandardError),
    slopeInterval: around(slope, t * slopeStandardError),
    residualSd: Math.sqrt(variance),
    degreesOfFreedom,
    rSquared: yy === 0 ? 1 : 1 - rss / yy,
    meanX,
    meanY,
    sumSquaresX: xx,
  }
}

function requireUsable(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  weights: ArrayLike<number> | undefined,
): void {
  if (x.length !== y.length || (weights && weights.length !== x.length)) {
    throw new StatisticsError('unequal-length', 'Each x needs its y (and its weight).')
  }
  if (x.length < 3) throw new StatisticsError('too-few', 'A line needs at least 3 points.')
  requireFinite(x, 'The x values')
  requireFinite(y, 'The y values')
  if (!weights) return
  requireFinite(weights, 'The weights')
  for (let i = 0; i < weights.length; i++) {
    if (weights[i]! <= 0) throw new StatisticsError('not-positive', 'Weights lie above 0.')
  }
}

function around(centre: number, half: number): Interval {
  return { lower: centre - half, upper: centre + half }
}
