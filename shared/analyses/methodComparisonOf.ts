import type { AgreementParameters, MethodComparison } from '#shared/schemas/agreement.ts'
import type { Estimate } from '#shared/schemas/estimate.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { biasAtLevels } from '#shared/statistics/agreement/biasAtLevels.ts'
import { demingRegression } from '#shared/statistics/agreement/demingRegression.ts'
import { linConcordance } from '#shared/statistics/agreement/linConcordance.ts'
import { ordinaryRegression } from '#shared/statistics/agreement/ordinaryRegression.ts'
import { passingBablokRegression } from '#shared/statistics/agreement/passingBablokRegression.ts'
import { pearson } from '#shared/statistics/agreement/pearson.ts'
import { spearman } from '#shared/statistics/agreement/spearman.ts'
import { moments } from '#shared/statistics/description/moments.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { FittedLine } from '#shared/terms/agreementTerms.ts'
import type { Pairs } from './agreementLimitsOf.ts'

type At = Pick<AgreementParameters, 'confidence' | 'errorVarianceRatio' | 'decisionLevels'>
type Line = MethodComparison['lines'][number]
type Part = Line['slope']

const NO_VALUE = { estimate: null, lower: null, upper: null }
const NO_INTERVAL = 'No interval: all pairs lie on one line, or there are fewer than 4.'

/**
 * Lines of the sensor (first) on the reference (second), correlations, and the bias at levels of the
 * reference; each that cannot be computed stands with the reason.
 */
export function methodComparisonOf(pairs: Pairs, at: At): MethodComparison {
  const { errorVarianceRatio, confidence: level } = at
  const { first: y, second: x } = pairs
  return {
    lines: [
      lineOf('ordinary', AGREEMENT_METHODS.ordinary.name, () => {
        const found = ordinaryRegression(x, y, { level })
        return {
          intercept: { estimate: found.intercept, ...found.interceptInterval },
          slope: { estimate: found.slope, ...found.slopeInterval },
          note: null,
        }
      }),
      lineOf('deming', AGREEMENT_METHODS.deming.name, () => {
        const { intercept, slope } = demingRegression(x, y, { level, errorVarianceRatio })
        return { intercept: only(intercept), slope: only(slope), note: null }
      }),
      lineOf('passingBablok', AGREEMENT_METHODS.passingBablok.name, () => {
        const { intercept, slope, notDefined } = passingBablokRegression(x, y, { level })
        const note = notDefined?.sentence ?? null
        return { intercept: only(intercept), slope: only(slope), note }
      }),
    ],
    levels: levelsOf(pairs, at),
    sd: moments(y.map((value, at) => value - x[at]!)).sd,
    concordance: estimateOf(AGREEMENT_METHODS.lin.name, () => {
      const { estimate, interval } = linConcordance(pairs, { level })
      return { estimate, interval }
    }),
    pearson: estimateOf(AGREEMENT_METHODS.pearson.name, () => {
      const { r, interval } = pearson(pairs, { level })
      return { estimate: r, interval }
    }),
    spearman: estimateOf(AGREEMENT_METHODS.spearman.name, () => {
      const { rho, interval } = spearman(pairs, { level })
      return { estimate: rho, interval }
    }),
  }
}

const only = ({ estimate, lower, upper }: Part): Part => ({ estimate, lower, upper })

function lineOf(
  line: FittedLine,
  method: string,
  fit: () => Pick<Line, 'intercept' | 'slope' | 'note'>,
): Line {
  const found = attempted(fit)
  if (typeof found === 'string')
    return { line, method, intercept: NO_VALUE, slope: NO_VALUE, note: found }
  return { line, method, ...found }
}

function estimateOf(
  method: string,
  compute: () => { estimate: number; interval: { lower: number; upper: number } | null },
): Estimate {
  const found = attempted(compute)
  if (typeof found === 'string') return { ...NO_VALUE, method, note: found }
  const { estimate, interval } = found
  return {
    estimate,
    lower: interval?.lower ?? null,
    upper: interval?.upper ?? null,
    method,
    note: interval ? null : NO_INTERVAL,
  }
}

function levelsOf({ first, second }: Pairs, at: At): MethodComparison['levels'] {
  const { confidence: level, errorVarianceRatio, decisionLevels } = at
  const found = attempted(() =>
    biasAtLevels(second, first, decisionLevels, { level, errorVarianceRatio }),
  )
  // Without a Deming line there is no bias at a level; the line itself says why.
  if (typeof found === 'string')
    return decisionLevels.map((each) => ({ level: each, ...NO_VALUE, percent: null }))
  return found.map(({ level: each, bias, biasPercent, lower, upper }) => ({
    level: each,
    estimate: bias,
    lower,
    upper,
    percent: biasPercent,
  }))
}

/** What was computed, or the sentence of a refusal. */
function attempted<T extends object>(compute: () => T): T | string {
  try {
    return compute()
  } catch (error) {
    if (error instanceof StatisticsError) return error.message
    throw error
  }
}
