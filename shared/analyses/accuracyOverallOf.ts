import type { AccuracyOverall, RuleCutOffs } from '#shared/schemas/analysis.ts'
import { type RocCurve, rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import type { CutOffPoint } from '#shared/statistics/cutOffs/cutOffPoint.ts'
import { cutOffRules } from '#shared/statistics/cutOffs/cutOffRules.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import type { AccuracyValues } from './accuracyValues.ts'
import { type AreaChoice, areaEstimateOf } from './areaEstimateOf.ts'
import { tooFew, withheldSentence } from './leastPerClass.ts'
import { storedCurveOf } from './storedCurveOf.ts'

/**
 * What does not hang on the cut-off: curve, area with its interval, cut-offs that rules choose. With
 * several sessions of a subject in it, each subject is one cluster.
 * @throws StatisticsError one-class, non-finite
 */
export function accuracyOverallOf(
  values: AccuracyValues,
  { direction, ...choice }: AreaChoice & { direction: Direction },
): AccuracyOverall {
  const { present, absent, counts } = values
  const curve = rocCurve({ present, absent, direction })
  const few = tooFew(counts.present, counts.absent)
  return {
    area: few ? null : areaEstimateOf(values, curve, choice),
    areaWithheld: few ? withheldSentence(counts.present, counts.absent) : null,
    curve: storedCurveOf(curve),
    rules: few ? [] : rulesOf(curve),
  }
}

function rulesOf(curve: RocCurve): RuleCutOffs[] {
  const { youden, closestToCorner, sensitivityAtLeast, specificityAtLeast } = cutOffRules(curve)
  return [
    { rule: 'youden', cutOffs: youden.cutOffs.map(toCutOff) },
    { rule: 'closestToCorner', cutOffs: closestToCorner.cutOffs.map(toCutOff) },
    { rule: 'sensitivityAtLeast', cutOffs: preferredFirst(sensitivityAtLeast) },
    { rule: 'specificityAtLeast', cutOffs: preferredFirst(specificityAtLeast) },
  ]
}

function preferredFirst({
  preferred,
  cutOffs,
}: {
  preferred: CutOffPoint
  cutOffs: CutOffPoint[]
}): RuleCutOffs['cutOffs'] {
  const others = cutOffs.filter((each) => each.point !== preferred.point)
  return [preferred, ...others].map(toCutOff)
}

const toCutOff = ({ threshold, sensitivity, specificity }: CutOffPoint) => ({
  threshold,
  sensitivity,
  specificity,
})
