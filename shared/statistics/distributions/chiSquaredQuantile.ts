import jStat from 'jstat'
import { requireProbability } from '../requireProbability.ts'
import { regularisedGamma } from './regularisedGamma.ts'
import { solveQuantile } from './solveQuantile.ts'

/**
 * The x with P(X ≤ x) = p for chi-squared: jStat's value, mended by Newton steps.
 * @throws StatisticsError 'out-of-range' unless 0 < p < 1
 */
export function chiSquaredQuantile(p: number, degreesOfFreedom: number): number {
  requireProbability(p, 'A probability')
  return solveQuantile(
    (x) => {
      const { lower, upper, density } = regularisedGamma(degreesOfFreedom / 2, x / 2)
      return { excess: p < 0.5 ? lower - p : 1 - p - upper, density: density / 2 }
    },
    { lower: 0, upper: 1e4 + 100 * degreesOfFreedom },
    jStat.chisquare.inv(p, degreesOfFreedom),
  )
}
