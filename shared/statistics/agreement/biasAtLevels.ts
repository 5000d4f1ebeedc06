import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import type { LevelOption } from '../Interval.ts'
import { requireFinite } from '../requireFinite.ts'
import { demingRegression } from './demingRegression.ts'

export type BiasAtLevel = {
  level: number
  /** Predicted second less the level itself, in the pairs' unit and in percent (null at 0). */
  bias: number
  biasPercent: number | null
  standardError: number
  lower: number
  upper: number
}

/**
 * Systematic difference at decision levels: the Deming line of y on x at each level, less the level, with
 * a jackknife interval.
 * @param x the reference, y the sensor, n ≥ 3 pairs in one unit  @param levels values of x
 * @throws StatisticsError as demingRegression
 * Source: CLSI EP09-A3 (2013), estimation of bias at medical decision levels; jackknife Linnet 1993.
 */
export function biasAtLevels(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  levels: ArrayLike<number>,
  { level = 0.95, errorVarianceRatio = 1 }: LevelOption & { errorVarianceRatio?: number } = {},
): BiasAtLevel[] {
  requireFinite(levels, 'The decision levels')
  const n = x.length
  return Array.from(levels, (at) => {
    // with x moved by the level, the intercept is the line's height there, and so is its jackknife
    const moved = Float64Array.from(x, (value) => value - at)
    const { intercept } = demingRegression(moved, y, { level, errorVarianceRatio })
    const bias = intercept.estimate - at
    const half = studentTQuantile(1 - (1 - level) / 2, n - 2) * intercept.standardError
    return {
      level: at,
      bias,
      biasPercent: at === 0 ? null : (100 * bias) / at,
      standardError: intercept.standardError,
      lower: bias - half,
      upper: bias + half,
    }
  })
}
