import jStat from 'jstat'
import { requireProbability } from '../requireProbability.ts'
import { regularisedBeta } from './regularisedBeta.ts'
import { solveQuantile } from './solveQuantile.ts'

/**
 * The x with I(x; a, b) = p: jStat's value, mended by Newton steps on the smaller tail.
 * @throws StatisticsError 'out-of-range' unless 0 < p < 1
 */
export function betaQuantile(p: number, a: number, b: number): number {
  requireProbability(p, 'A probability')
  return solveQuantile(
    (x) => {
      const { lower, upper, density } = regularisedBeta(x, 1 - x, a, b)
      return { excess: p < 0.5 ? lower - p : 1 - p - upper, density }
    },
    { lower: 0, upper: 1 },
    jStat.beta.inv(p, a, b),
  )
}
