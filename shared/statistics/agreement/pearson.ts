import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

export type Correlation = { n: number; r: number; interval: Interval | null }

/**
 * Pearson's correlation with its interval on Fisher's z scale (null for n < 4 or |r| = 1). Units may
 * differ. A correlation is not agreement.
 * @param pairs n ≥ 3
 * @throws StatisticsError 'unequal-length', 'too-few', 'non-finite', 'constant'
 * Source: Fisher 1921, Metron 1:3.
 */
export function pearson(
  { first, second }: Pick<Pairs, 'first' | 'second'>,
  { level = 0.95 }: LevelOption = {},
): Correlation {
  requirePairs({ first, second }, 3)
  const n = first.length
  let meanX = 0
  let meanY = 0
  for (let i = 0; i < n; i++) {
    meanX += first[i]! / n
    meanY += second[i]! / n
  }
  let xx = 0
  let yy = 0
  let xy = 0
  for (let i = 0; i < n; i++) {
    const x = first[i]! - meanX
    const y = second[i]! - meanY
    xx += x * x
    yy += y * y
    xy += x * y
  }
  if (xx === 0 || yy === 0) {
    throw new StatisticsError('constant', 'One of the two never varies, so nothing can correlate.')
  }
  const r = Math.max(-1, Math.min(1, xy / Math.sqrt(xx * yy)))
  if (n < 4 || Math.abs(r) === 1) return { n, r, interval: null }
  const half = zFor(level) / Math.sqrt(n - 3)
  const fisher = Math.atanh(r)
  return { n, r, interval: { lower: Math.tanh(fisher - half), upper: Math.tanh(fisher + half) } }
}
