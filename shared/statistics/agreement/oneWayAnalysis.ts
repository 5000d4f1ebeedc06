import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** Values of each subject, each with at least one value. */
export type Groups = ArrayLike<number>[]

export type OneWayAnalysis = {
  subjects: number
  observations: number
  grandMean: number
  means: Float64Array
  sizes: Int32Array
  meanSquareBetween: number
  /** Null where no subject has a second value. */
  meanSquareWithin: number | null
  dfBetween: number
  dfWithin: number
  /** The effective number of values a subject where they differ: ((Σm)² − Σm²)/((n − 1)Σm). */
  effectiveReplicates: number
  harmonicReplicates: number
}

/**
 * One-way analysis of variance by subject, with unequal numbers of replicates.
 * @param groups at least two subjects, each with at least one finite value
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: Searle, Casella & McCulloch 1992, Variance Components, ch. 3.
 */
export function oneWayAnalysis(groups: Groups): OneWayAnalysis {
  const n = groups.length
  if (n < 2) throw new StatisticsError('too-few', 'At least two subjects are needed.')
  const means = new Float64Array(n)
  const sizes = new Int32Array(n)
  let observations = 0
  let total = 0
  let within = 0
  groups.forEach((values, i) => {
    const { mean, sum, squares } = groupMoments(values)
    means[i] = mean
    sizes[i] = values.length
    observations += values.length
    total += sum
    within += squares
  })
  const grandMean = total / observations
  const between = means.reduce((s, m, i) => s + sizes[i]! * (m - grandMean) ** 2, 0)
  const sumSquaredSizes = sizes.reduce((s, m) => s + m * m, 0)
  const dfWithin = observations - n
  return {
    subjects: n,
    observations,
    grandMean,
    means,
    sizes,
    meanSquareBetween: between / (n - 1),
    meanSquareWithin: dfWithin === 0 ? null : within / dfWithin,
    dfBetween: n - 1,
    dfWithin,
    effectiveReplicates: (observations * observations - sumSquaredSizes) / ((n - 1) * observations),
    harmonicReplicates: n / sizes.reduce((s, m) => s + 1 / m, 0),
  }
}

function groupMoments(values: ArrayLike<number>) {
  if (values.length === 0) {
    throw new StatisticsError('too-few', 'Each subject needs at least one value.')
  }
  requireFinite(values, 'The replicates')
  let sum = 0
  for (let i = 0; i < values.length; i++) sum += values[i]!
  const mean = sum / values.length
  let squares = 0
  for (let i = 0; i < values.length; i++) squares += (values[i]! - mean) ** 2
  return { mean, sum, squares }
}
