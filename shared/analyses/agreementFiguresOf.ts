import type { AgreementFigures } from '#shared/schemas/analysis.ts'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import type { LimitsOfDifferences } from '#shared/statistics/agreement/limitsOfDifferences.ts'
import type { Interval } from '#shared/statistics/Interval.ts'
import { METHODS } from '#shared/statistics/METHODS.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { AcceptanceVerdict, SessionRule } from '#shared/terms/analysis.ts'
import type { AgreementPairs } from './agreementPairs.ts'

type Limits = { lower: number; upper: number }

const AVERAGED =
  'Sessions of a subject were averaged first: these limits hold for such averages, and limits for single sessions are wider.'
const NO_SPREAD = 'All differences are the same, so the limits and their intervals have no width.'

/**
 * Bias and limits of agreement of sensor − reference with their intervals, judged against acceptance
 * limits where there are any. Several sessions of a subject need a rule that makes one pair of them.
 * @throws StatisticsError too-few, non-finite, out-of-range (several sessions under the rule `every`)
 */
export function agreementFiguresOf(
  { sensor, reference, counts }: AgreementPairs,
  at: { sessionRule: SessionRule; confidence: number; acceptance: Limits | null },
): AgreementFigures {
  if (at.sessionRule === 'every' && counts.severalSessions > 0)
    throw new StatisticsError(
      'out-of-range',
      `${counts.severalSessions} subjects have several sessions, and limits of agreement over all of them would be too narrow. Choose the first session, or the mean or median of each subject.`,
    )
  const found = limitsOfAgreement({ first: sensor, second: reference }, { level: at.confidence })
  const averaged = ['mean', 'median'].includes(at.sessionRule) && counts.severalSessions > 0
  return {
    bias: { estimate: found.bias, ...found.biasInterval },
    sd: found.sd,
    lowerLimit: lineOf(found.lower, found.exact.lower),
    upperLimit: lineOf(found.upper, found.exact.upper),
    biasMethod: 't distribution',
    limitsMethod: METHODS.limitsExact.name,
    acceptance: at.acceptance && {
      ...at.acceptance,
      verdict: judged(found, at.acceptance),
    },
    caveats: [...(averaged ? [AVERAGED] : []), ...(found.sd === 0 ? [NO_SPREAD] : [])],
  }
}

const lineOf = (estimate: number, { lower, upper }: Interval) => ({ estimate, lower, upper })

function judged(found: LimitsOfDifferences, acceptable: Limits): AcceptanceVerdict {
  if (found.lower < acceptable.lower || found.upper > acceptable.upper) return 'beyond'
  const shown =
    found.exact.lower.lower >= acceptable.lower && found.exact.upper.upper <= acceptable.upper
  return shown ? 'within' : 'notShown'
}
