import jStat from 'jstat'
import { requireProbability } from '../requireProbability.ts'
import { normalUpperTail } from './normalUpperTail.ts'

/**
 * The z with P(Z ≤ z) = p: jStat's value, mended by Newton steps on the tail itself.
 * @throws StatisticsError 'out-of-range' unless 0 < p < 1
 */
export function normalQuantile(p: number): number {
  requireProbability(p, 'A probability')
  if (p === 0.5) return 0
  if (p > 0.5) return -normalQuantile(1 - p)
  let z = jStat.normal.inv(p, 0, 1)
  for (let step = 0; step < 3; step++) {
    const tail = normalUpperTail(-z)
    const density = Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI)
    // Newton on the logarithm of the tail, which is almost straight
    z -= (Math.log(tail / p) * tail) / density
  }
  return z
}
