import type { AgreementFigures, AgreementParameters } from '#shared/schemas/agreement.ts'
import { SCALE_UNITS } from '#shared/terms/agreementTerms.ts'
import type { AcceptanceVerdict } from '#shared/terms/analysis.ts'
import { agreementHints } from './agreementHints.ts'
import { agreementLimitsOf, type LimitLines } from './agreementLimitsOf.ts'
import type { AgreementPairs } from './agreementPairs.ts'
import { methodComparisonOf } from './methodComparisonOf.ts'
import { replicateLimitsOf } from './replicateLimitsOf.ts'

export type AgreementQuestion = Omit<AgreementParameters, 'kind' | 'analyteKey' | 'referenceKey'>
type Limits = { lower: number; upper: number }

const AVERAGED =
  'Sessions of a subject were averaged first: these limits hold for such averages, and limits for single sessions are wider.'
const NO_SPREAD = 'All differences are the same, so the limits and their intervals have no width.'
const VARYING =
  'Every session counts, with subjects as clusters and the true value taken to change from session to session: sensor and reference are compared within each session. The limits hold for a single session.'
const CONSTANT =
  'Every session counts, with subjects as clusters and the true value of a subject taken to stay the same: the sessions are repeats by each method. The limits hold for a single session. Choose this only where nothing in the subject changed between sessions.'
const TOO_FEW_FOR_PERCENTILES =
  'There are too few pairs for an interval at the percentiles: the limits are little more than the extremes. An interval takes about 150 pairs.'
const CROSSING =
  'The fitted spread falls below 0 at one end of what was measured, so the limits cross there and mean nothing. Choose a spread that is the same at all sizes, or another scale.'
const ONE_PAIR_EACH =
  'Lines and correlations take one pair of each subject: with every session they would count subjects twice. Choose the first session, or the mean or median of each subject, to see them.'

/**
 * Bias and limits of agreement of sensor and reference on a scale with their intervals, hints whether
 * the scale fits, lines and correlations, judged against acceptance limits where there are any.
 * @throws StatisticsError too-few, non-finite, not-positive, constant, out-of-range
 */
export function agreementFiguresOf(pairs: AgreementPairs, at: AgreementQuestion): AgreementFigures {
  const { scale, sessionRule, trueValue } = at
  const several = pairs.counts.severalSessions > 0
  const clustered = sessionRule === 'every' && several
  const both = { first: pairs.sensor, second: pairs.reference }
  const lines = clustered ? replicateLimitsOf(pairs, at) : agreementLimitsOf(both, at)
  const crossing = lines.alongMean.some(
    ({ lowerLimit, upperLimit }) => upperLimit.estimate < lowerLimit.estimate,
  )
  const noInterval = lines.lowerLimit.lower === null || lines.upperLimit.upper === null
  const caveats = [
    ...(clustered ? [trueValue === 'varying' ? VARYING : CONSTANT] : []),
    ...(several && ['mean', 'median'].includes(sessionRule) ? [AVERAGED] : []),
    ...(lines.sd === 0 ? [NO_SPREAD] : []),
    ...(crossing ? [CROSSING] : []),
    ...(scale === 'nonparametric' && noInterval ? [TOO_FEW_FOR_PERCENTILES] : []),
  ]
  return {
    replicates: null,
    ...lines,
    scale,
    differenceUnit: SCALE_UNITS[scale],
    ...(clustered ? { normality: null, slopeOnMean: null } : agreementHints(both, at)),
    comparison: clustered ? null : methodComparisonOf(both, at),
    comparisonWithheld: clustered ? ONE_PAIR_EACH : null,
    acceptance: at.acceptance && { ...at.acceptance, verdict: judged(lines, at.acceptance) },
    caveats,
  }
}

/** Sloping limits are judged at both ends of what was measured. */
function judged(lines: LimitLines, acceptable: Limits): AcceptanceVerdict {
  const places = lines.alongMean.length > 0 ? lines.alongMean : [lines]
  const inside = (value: number | null) =>
    value !== null && value >= acceptable.lower && value <= acceptable.upper
  const estimates = places.flatMap(({ lowerLimit, upperLimit }) => [
    lowerLimit.estimate,
    upperLimit.estimate,
  ])
  if (!estimates.every(inside)) return 'beyond'
  const outer = places.flatMap(({ lowerLimit, upperLimit }) => [lowerLimit.lower, upperLimit.upper])
  return outer.every(inside) ? 'within' : 'notShown'
}
