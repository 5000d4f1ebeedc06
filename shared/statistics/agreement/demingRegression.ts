import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import type { LevelOption } from '../Interval.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type JackknifeEstimate = {
  estimate: number
  standardError: number
  lower: number
  upper: number
}

export type DemingRegression = {
  n: number
  errorVarianceRatio: number
  intercept: JackknifeEstimate
  slope: JackknifeEstimate
}

/** Sums about a fixed origin: leaving one pair out is five subtractions. */
type Sums = { n: number; x: number; y: number; xx: number; yy: number; xy: number }

/**
 * Deming regression of y on x, both with error; standard errors from jackknife pseudo-values, intervals
 * estimate ∓ t(n − 2)·SE.
 * @param x, y n ≥ 3 pairs  @param options `errorVarianceRatio` var(error y)/var(error x), 1 unless given
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant', 'out-of-range'
 * Source: Linnet 1990, Stat Med 9:1463; 1993, Clin Chem 39:424.
 */
export function demingRegression(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  { level = 0.95, errorVarianceRatio = 1 }: LevelOption & { errorVarianceRatio?: number } = {},
): DemingRegression {
  const n = x.length
  if (y.length !== n) throw new StatisticsError('unequal-length', 'Each x needs its y.')
  if (n < 3) throw new StatisticsError('too-few', 'Deming regression needs at least 3 pairs.')
  requireFinite(x, 'The x values')
  requireFinite(y, 'The y values')
  if (!(errorVarianceRatio > 0 && Number.isFinite(errorVarianceRatio))) {
    throw new StatisticsError('out-of-range', 'The ratio of error variances lies above 0.')
  }
  // sums about the means lose no digits when a pair is taken out
  const originX = mean(x)
  const originY = mean(y)
  const sums: Sums = { n, x: 0, y: 0, xx: 0, yy: 0, xy: 0 }
  for (let i = 0; i < n; i++) shift(sums, x[i]! - originX, y[i]! - originY, 1)
  const line = (s: Sums) => lineFrom(s, errorVarianceRatio, originX, originY)
  const full = line(sums)
  const slopes = new Float64Array(n)
  const intercepts = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    const without = { ...sums, n: n - 1 }
    shift(without, x[i]! - originX, y[i]! - originY, -1)
    const { intercept, slope } = line(without)
    slopes[i] = n * full.slope - (n - 1) * slope
    intercepts[i] = n * full.intercept - (n - 1) * intercept
  }
  const t = studentTQuantile(1 - (1 - level) / 2, n - 2)
  return {
    n,
    errorVarianceRatio,
    intercept: jackknife(full.intercept, intercepts, t),
    slope: jackknife(full.slope, slopes, t),
  }
}

function mean(values: ArrayLike<number>): number {
  let total = 0
  for (let i = 0; i < values.length; i++) total += values[i]!
  return total / values.length
}

function shift(sums: Sums, x: number, y: number, sign: 1 | -1): void {
  sums.x += sign * x
  sums.y += sign * y
  sums.xx += sign * x * x
  sums.yy += sign * y * y
  sums.xy += sign * x * y
}

function lineFrom(s: Sums, ratio: number, originX: number, originY: number) {
  const sxx = s.xx - (s.x * s.x) / s.n
  const syy = s.yy - (s.y * s.y) / s.n
  const sxy = s.xy - (s.x * s.y) / s.n
  if (Math.abs(sxy) <= 1e-14 * Math.sqrt(Math.abs(sxx * syy))) {
    throw new StatisticsError(
      'constant',
      'The two measures do not vary together (even after leaving one pair out), so there is no line.',
    )
  }
  const excess = syy - ratio * sxx
  const root = Math.sqrt(excess * excess + 4 * ratio * sxy * sxy)
  // the form without cancellation for each sign of the excess
  const slope = excess > 0 ? (excess + root) / (2 * sxy) : (2 * ratio * sxy) / (root - excess)
  const intercept = originY + s.y / s.n - slope * (originX + s.x / s.n)
  return { slope, intercept }
}

function jackknife(estimate: number, pseudo: Float64Array, t: number): JackknifeEstimate {
  const n = pseudo.length
  const centre = mean(pseudo)
  let squares = 0
  for (const value of pseudo) squares += (value - centre) ** 2
  const standardError = Math.sqrt(squares / (n - 1) / n)
  const half = t * standardError
  return { estimate, standardError, lower: estimate - half, upper: estimate + half }
}
