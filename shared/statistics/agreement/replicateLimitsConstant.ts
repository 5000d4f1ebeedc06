import { studentTQuantile } from '../distributions/studentTQuantile.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type MoverLimits, moverLimits } from './moverLimits.ts'
import { type OneWayAnalysis, oneWayAnalysis } from './oneWayAnalysis.ts'

/** A subject's replicates by the two methods; the numbers may differ. One unit for both. */
export type ReplicatesByMethod = { first: ArrayLike<number>; second: ArrayLike<number> }

export type ReplicateLimitsConstant = MoverLimits & {
  subjects: number
  /** Mean difference of the subjects' means, its interval by t(n − 1). */
  bias: number
  biasInterval: Interval
  varianceOfMeanDifferences: number
  /** Null where a method has no second reading of anybody. */
  meanSquareWithinFirst: number | null
  meanSquareWithinSecond: number | null
}

/**
 * Limits of agreement for single readings from replicates taken while the true value stays the same:
 * var(difference of means) + (1 − mean 1/m)·MSW for each method; intervals of the limits by MOVER.
 * @param subjects at least two, each with at least one reading by each method
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: Bland & Altman 1999, Stat Methods Med Res 8:135, sections 5.1 and 5.2; Zou 2013.
 */
export function replicateLimitsConstant(
  subjects: ReplicatesByMethod[],
  { level = 0.95, coverage = 0.95 }: LevelOption & { coverage?: number } = {},
): ReplicateLimitsConstant {
  const n = subjects.length
  if (n < 2) throw new StatisticsError('too-few', 'At least two subjects are needed.')
  const first = oneWayAnalysis(subjects.map((s) => s.first))
  const second = oneWayAnalysis(subjects.map((s) => s.second))
  const differences = first.means.map((m, i) => m - second.means[i]!)
  const bias = differences.reduce((sum, d) => sum + d, 0) / n
  const variance = differences.reduce((sum, d) => sum + (d - bias) ** 2, 0) / (n - 1)
  const limits = moverLimits(
    {
      bias,
      biasVariance: variance / n,
      parts: [{ variance, df: n - 1 }, withinPart(first), withinPart(second)],
    },
    { level, coverage },
  )
  const half = studentTQuantile(1 - (1 - level) / 2, n - 1) * Math.sqrt(variance / n)
  return {
    ...limits,
    subjects: n,
    bias,
    biasInterval: { lower: bias - half, upper: bias + half },
    varianceOfMeanDifferences: variance,
    meanSquareWithinFirst: first.meanSquareWithin,
    meanSquareWithinSecond: second.meanSquareWithin,
  }
}

function withinPart({ meanSquareWithin, harmonicReplicates, dfWithin }: OneWayAnalysis) {
  return { variance: (1 - 1 / harmonicReplicates) * (meanSquareWithin ?? 0), df: dfWithin }
}
