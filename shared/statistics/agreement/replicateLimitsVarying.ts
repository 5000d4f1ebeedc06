import { zFor } from '../distributions/zFor.ts'
import type { LevelOption } from '../Interval.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { type MoverLimits, moverLimits } from './moverLimits.ts'
import { oneWayAnalysis } from './oneWayAnalysis.ts'
import type { Pairs } from './Pairs.ts'
import { requirePairs } from './requirePairs.ts'

export type ReplicateLimitsVarying = {
  subjects: number
  pairs: number
  /** Mean of all differences. */
  bias: number
  meanSquareBetween: number
  meanSquareWithin: number
  effectiveReplicates: number
  /** (MSB − MSW)/m0, a negative value set to 0. */
  betweenVariance: number
  withinVariance: number
  sd: number
  lower: number
  upper: number
  /** Zou 2013, on the mean of the subjects' mean differences. */
  mover: MoverLimits & { bias: number; harmonicReplicates: number }
}

/**
 * Limits of agreement from several pairs a subject when the true value changes between pairs: each pair
 * is one reading by both methods at one moment.
 * @param subjects one entry a subject with its pairs, at least two subjects, one of them with two pairs
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'different-units'
 * Source: Bland & Altman 2007, J Biopharm Stat 17:571; intervals Zou 2013, Stat Methods Med Res 22:630.
 */
export function replicateLimitsVarying(
  subjects: Pairs[],
  { level = 0.95, coverage = 0.95 }: LevelOption & { coverage?: number } = {},
): ReplicateLimitsVarying {
  const differences = subjects.map((pairs) => {
    requirePairs(pairs, 1)
    return Float64Array.from(pairs.first, (value, i) => value - pairs.second[i]!)
  })
  const analysis = oneWayAnalysis(differences)
  const { meanSquareBetween: msb, meanSquareWithin: msw, means } = analysis
  if (msw === null) {
    throw new StatisticsError('too-few', 'No subject has a second pair: use the simple limits.')
  }
  const betweenVariance = Math.max(0, (msb - msw) / analysis.effectiveReplicates)
  const sd = Math.sqrt(betweenVariance + msw)
  const z = zFor(coverage)
  const n = analysis.subjects
  const moverBias = means.reduce((sum, m) => sum + m, 0) / n
  const varianceOfMeans = means.reduce((sum, m) => sum + (m - moverBias) ** 2, 0) / (n - 1)
  const mover = moverLimits(
    {
      bias: moverBias,
      biasVariance: varianceOfMeans / n,
      parts: [
        { variance: varianceOfMeans, df: n - 1 },
        { variance: (1 - 1 / analysis.harmonicReplicates) * msw, df: analysis.dfWithin },
      ],
    },
    { level, coverage },
  )
  return {
    subjects: n,
    pairs: analysis.observations,
    bias: analysis.grandMean,
    meanSquareBetween: msb,
    meanSquareWithin: msw,
    effectiveReplicates: analysis.effectiveReplicates,
    betweenVariance,
    withinVariance: msw,
    sd,
    lower: analysis.grandMean - z * sd,
    upper: analysis.grandMean + z * sd,
    mover: { ...mover, bias: moverBias, harmonicReplicates: analysis.harmonicReplicates },
  }
}
