import { midranks } from '../description/midranks.ts'
import { studentTTwoSided } from '../distributions/studentTTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { Pairs } from './Pairs.ts'
import { pearson } from './pearson.ts'

export type RankCorrelation = {
  n: number
  rho: number
  /** Fisher's z with variance (1 + ρ²/2)/(n − 3); null for n < 4 or |ρ| = 1. */
  interval: Interval | null
  /** Two-sided, by t with n − 2 degrees of freedom; null for |ρ| = 1. */
  p: number | null
}

/**
 * Spearman's rank correlation: Pearson's of the midranks. The units may differ, so this is what is
 * offered where agreement has no meaning.
 * @param pairs n ≥ 3
 * @throws StatisticsError 'unequal-length', 'too-few', 'non-finite', 'constant'
 * Source: Spearman 1904, Am J Psychol 15:72; interval Bonett & Wright 2000, Psychometrika 65:23.
 */
export function spearman(
  { first, second }: Pick<Pairs, 'first' | 'second'>,
  { level = 0.95 }: LevelOption = {},
): RankCorrelation {
  const { n, r: rho } = pearson({ first: midranks(first), second: midranks(second) })
  if (Math.abs(rho) === 1) return { n, rho, interval: null, p: null }
  const t = rho * Math.sqrt((n - 2) / (1 - rho * rho))
  const p = studentTTwoSided(t, n - 2)
  if (n < 4) return { n, rho, interval: null, p }
  const half = zFor(level) * Math.sqrt((1 + (rho * rho) / 2) / (n - 3))
  const fisher = Math.atanh(rho)
  const interval = { lower: Math.tanh(fisher - half), upper: Math.tanh(fisher + half) }
  return { n, rho, interval, p }
}
