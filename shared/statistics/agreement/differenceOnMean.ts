import { studentTTwoSided } from '../distributions/studentTTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import { type LeastSquares, leastSquares } from '../regression/leastSquares.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

export type DifferenceOnMean = {
  line: LeastSquares
  /** Test of a slope of 0; null where the points lie on the line exactly. */
  slopeT: number | null
  slopeP: number | null
  /** Absolute residuals on the mean: does the spread change? */
  spread: { intercept: number; slope: number; p: number | null }
  /**
   * Limits of agreement at a mean: (b0 + b1·m) ∓ z·√(π/2)·(c0 + c1·m) with `changing` spread,
   * ∓ z·residual SD without.
   */
  limitsAt: (mean: number, spread: 'changing' | 'constant') => { lower: number; upper: number }
}

/**
 * Regression of the difference on the mean of the pair, for a bias or a spread that depends on size.
 * @param pairs n ≥ 3 pairs in one unit, means not all equal
 * @throws StatisticsError as limitsOfAgreement, and 'constant'
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135, section 3.2.
 */
export function differenceOnMean(
  pairs: Pairs,
  { level = 0.95, coverage = 0.95 }: LevelOption & { coverage?: number } = {},
): DifferenceOnMean {
  requirePairs(pairs, 3)
  const { first, second } = pairs
  const means = Float64Array.from(first, (value, i) => (value + second[i]!) / 2)
  const differences = Float64Array.from(first, (value, i) => value - second[i]!)
  const line = leastSquares(means, differences, undefined, { level })
  const residuals = means.map((m, i) =>
    Math.abs(differences[i]! - line.meanY - line.slope * (m - line.meanX)),
  )
  const spread = leastSquares(means, residuals, undefined, { level })
  const z = zFor(coverage)
  const slope = slopeTest(line)
  return {
    line,
    slopeT: slope.t,
    slopeP: slope.p,
    spread: { intercept: spread.intercept, slope: spread.slope, p: slopeTest(spread).p },
    limitsAt: (mean, kind) => {
      const centre = line.intercept + line.slope * mean
      // a fitted spread below 0 at the far end means no spread there, not limits crossed over
      const changing = Math.max(0, spread.intercept + spread.slope * mean)
      const half = z * (kind === 'changing' ? Math.sqrt(Math.PI / 2) * changing : line.residualSd)
      return { lower: centre - half, upper: centre + half }
    },
  }
}

function slopeTest(line: LeastSquares): { t: number | null; p: number | null } {
  if (line.slopeStandardError === 0) return { t: null, p: null }
  const t = line.slope / line.slopeStandardError
  return { t, p: studentTTwoSided(t, line.degreesOfFreedom) }
}
