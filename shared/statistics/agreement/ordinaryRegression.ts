import type { LevelOption } from '../Interval.ts'
import { type LeastSquares, leastSquares } from '../regression/leastSquares.ts'

/**
 * Ordinary least squares of y on x. For comparing methods it assumes that x is free of error and flattens
 * the slope otherwise: prefer Deming or Passing–Bablok.
 * @param x, y n ≥ 3 pairs
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant'
 */
export function ordinaryRegression(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  options: LevelOption = {},
): LeastSquares {
  return leastSquares(x, y, undefined, options)
}
