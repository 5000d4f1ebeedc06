import type { AgreementFigures, AgreementParameters } from '#shared/schemas/agreement.ts'
import { differenceOnMean } from '#shared/statistics/agreement/differenceOnMean.ts'
import { shapiroWilk } from '#shared/statistics/agreement/shapiroWilk.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { Pairs } from './agreementLimitsOf.ts'
import { plottedDifference } from './plottedDifference.ts'

type Hints = Pick<AgreementFigures, 'normality' | 'slopeOnMean'>

/**
 * Signs that a scale may not fit: differences far from normal (on the scale's own; logarithms for
 * ratios), and a difference that grows with the mean. Null where a test does not apply.
 */
export function agreementHints(
  pairs: Pairs,
  { scale, confidence }: Pick<AgreementParameters, 'scale' | 'confidence'>,
): Hints {
  const onScale = pairs.first.map((value, at) => {
    const difference = plottedDifference(scale, value, pairs.second[at]!)
    return scale === 'ratio' ? Math.log(difference) : difference
  })
  return {
    normality: orNull(() => {
      const { w, p } = shapiroWilk(onScale)
      return { w, p }
    }),
    slopeOnMean: orNull(() => {
      const { line, slopeP } = differenceOnMean(pairs, { level: confidence })
      return { slope: line.slope, ...line.slopeInterval, p: slopeP }
    }),
  }
}

function orNull<T>(compute: () => T): T | null {
  try {
    return compute()
  } catch (error) {
    if (error instanceof StatisticsError) return null
    throw error
  }
}
