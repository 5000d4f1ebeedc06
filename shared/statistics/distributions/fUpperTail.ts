import { regularisedBeta } from './regularisedBeta.ts'

/** P(F > f) for the F distribution with df1 and df2 degrees of freedom. */
export function fUpperTail(f: number, df1: number, df2: number): number {
  if (f <= 0) return 1
  const total = df2 + df1 * f
  return regularisedBeta(df2 / total, (df1 * f) / total, df2 / 2, df1 / 2).lower
}
