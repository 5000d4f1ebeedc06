import type { AccuracyOverall, RuleCutOffs } from '#shared/schemas/analysis.ts'
import { clusteredArea } from '#shared/statistics/accuracy/clusteredArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { type RocCurve, rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import type { CutOffPoint } from '#shared/statistics/cutOffs/cutOffPoint.ts'
import { cutOffRules } from '#shared/statistics/cutOffs/cutOffRules.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import type { AccuracyValues } from './accuracyValues.ts'

/** With fewer subjects than this in a class an area says next to nothing. */
export const LEAST_PER_CLASS = 10

/**
 * What does not hang on the cut-off: curve, area with its interval, cut-offs that rules choose. With
 * several sessions of a subject in it, each subject is one cluster.
 * @throws StatisticsError one-class, non-finite
 */
export function accuracyOverallOf(
  values: AccuracyValues,
  { direction, confidence }: { direction: Direction; confidence: number },
): AccuracyOverall {
  const { present, absent, counts } = values
  const curve = rocCurve({ present, absent, direction })
  const few = Math.min(counts.present, counts.absent) < LEAST_PER_CLASS
  return {
    area: few ? null : areaOf(values, curve, direction, confidence),
    areaWithheld: few ? withheld(counts) : null,
    curve: {
      thresholds: Array.from(curve.thresholds, (each) => (Number.isFinite(each) ? each : null)),
      truePositives: [...curve.truePositives],
      falsePositives: [...curve.falsePositives],
    },
    rules: few ? [] : rulesOf(curve),
  }
}

function areaOf(
  { present, absent, presentSubjects, absentSubjects }: AccuracyValues,
  curve: RocCurve,
  direction: Direction,
  level: number,
): AccuracyOverall['area'] {
  const { area, standardError, shown, notEstimable } =
    presentSubjects && absentSubjects
      ? clusteredArea({ present, absent, direction, presentSubjects, absentSubjects }, { level })
      : delongArea(curve, { level })
  return {
    estimate: area,
    lower: shown.lower,
    upper: shown.upper,
    method: shown.method,
    standardError,
    note: notEstimable?.sentence ?? null,
  }
}

function withheld({ present, absent }: { present: number; absent: number }): string {
  return `No area is given: it takes at least ${LEAST_PER_CLASS} subjects with the condition and ${LEAST_PER_CLASS} without, and there are ${present} and ${absent}.`
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
