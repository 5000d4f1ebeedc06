import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { type LeastSquares, leastSquares } from '../regression/leastSquares.ts'
import { differenceOnMean } from './differenceOnMean.ts'
import type { Pairs } from './Pairs.ts'

type Estimate = Interval & { estimate: number }

export type RegressionLimits = {
  n: number
  residualSd: number
  /** Change of each line per unit of the mean. */
  slopes: { bias: number; lower: number; upper: number }
  /** Bias and limits at a mean, each with its interval. */
  at: (mean: number) => { bias: Estimate; lower: Estimate; upper: Estimate }
}

/**
 * Limits of agreement that follow the size: the line of difference on mean, ∓ z·residual SD, or ∓
 * z·√(π/2) times the line of absolute residuals on mean. Intervals by t(n − 2) and the delta method:
 * var(limit) = var(line) + z²·s²/(2(n − 2)), or + z²·(π/2)·var(line of absolute residuals); both
 * approximate, as the errors of bias and spread are taken as independent. The lines are as
 * differenceOnMean gives them except that a spread below 0 is not cut off.
 * @param pairs n ≥ 3 pairs in one unit, means not all equal
 * @throws StatisticsError as differenceOnMean
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135, section 3.2; intervals carried over from
 * their section 2 with the variances of a fitted line (Draper & Smith 1998, ch. 1).
 */
export function regressionLimits(
  pairs: Pairs,
  spread: 'changing' | 'constant',
  { level = 0.95, coverage = 0.95 }: LevelOption & { coverage?: number } = {},
): RegressionLimits {
  const { line } = differenceOnMean(pairs, { level, coverage })
  const z = zFor(coverage)
  const t = studentTQuantile(1 - (1 - level) / 2, line.degreesOfFreedom)
  const half =
    spread === 'changing'
      ? changingHalf(absoluteResiduals(pairs, line), z * Math.sqrt(Math.PI / 2))
      : constantHalf(line, z)
  return {
    n: line.n,
    residualSd: line.residualSd,
    slopes: { bias: line.slope, lower: line.slope - half.slope, upper: line.slope + half.slope },
    at: (mean) => {
      const centre = heightAt(line, mean)
      const variance = varianceAt(line, mean)
      const width = half.at(mean)
      const error = t * Math.sqrt(variance + half.varianceAt(mean))
      return {
        bias: around(centre, t * Math.sqrt(variance)),
        lower: around(centre - width, error),
        upper: around(centre + width, error),
      }
    },
  }
}

type Half = {
  slope: number
  at: (mean: number) => number
  varianceAt: (mean: number) => number
}

function constantHalf(line: LeastSquares, z: number): Half {
  const variance = (z * z * line.residualSd ** 2) / (2 * line.degreesOfFreedom)
  return { slope: 0, at: () => z * line.residualSd, varianceAt: () => variance }
}

function changingHalf(residuals: LeastSquares, factor: number): Half {
  return {
    slope: factor * residuals.slope,
    at: (mean) => factor * heightAt(residuals, mean),
    varianceAt: (mean) => factor * factor * varianceAt(residuals, mean),
  }
}

function absoluteResiduals({ first, second }: Pairs, line: LeastSquares): LeastSquares {
  const means = Float64Array.from(first, (value, i) => (value + second[i]!) / 2)
  const residuals = means.map((mean, i) => Math.abs(first[i]! - second[i]! - heightAt(line, mean)))
  return leastSquares(means, residuals)
}

const heightAt = ({ meanX, meanY, slope }: LeastSquares, x: number): number =>
  meanY + slope * (x - meanX)

/** Variance of the fitted line's height at x. */
const varianceAt = ({ n, residualSd, meanX, sumSquaresX }: LeastSquares, x: number): number =>
  residualSd ** 2 * (1 / n + (x - meanX) ** 2 / sumSquaresX)

const around = (estimate: number, half: number): Estimate => ({
  estimate,
  lower: estimate - half,
  upper: estimate + half,
})
