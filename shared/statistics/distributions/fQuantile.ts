import { betaQuantile } from './betaQuantile.ts'

/**
 * The f with P(F ≤ f) = p, by way of the beta quantile from the end that keeps its digits.
 * @throws StatisticsError 'out-of-range' unless 0 < p < 1
 */
export function fQuantile(p: number, df1: number, df2: number): number {
  if (p < 0.5) return 1 / fQuantile(1 - p, df2, df1)
  const x = betaQuantile(1 - p, df2 / 2, df1 / 2)
  return ((1 - x) / x) * (df2 / df1)
}
