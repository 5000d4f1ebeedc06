import type { AccuracyAtCutOffResult, MeasureRow } from '#shared/schemas/analysis.ts'
import { accuracyAtCutOff } from '#shared/statistics/cutOffs/accuracyAtCutOff.ts'
import type { RatioEstimate } from '#shared/statistics/cutOffs/logRatio.ts'
import { observedPredictiveValues } from '#shared/statistics/cutOffs/observedPredictiveValues.ts'
import {
  type PredictiveValue,
  predictiveValuesAtPrevalence,
} from '#shared/statistics/cutOffs/predictiveValuesAtPrevalence.ts'
import { twoByTwo } from '#shared/statistics/cutOffs/twoByTwo.ts'
import type { ProportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'
import type { Measure } from '#shared/terms/analysis.ts'
import type { Direction, Sampling } from '#shared/terms/protocol.ts'
import type { AccuracyValues } from './accuracyValues.ts'

type AtCutOff = {
  direction: Direction
  confidence: number
  prevalence: number | null
  sampling: Sampling
}

const SESSIONS_TOGETHER =
  'No intervals are given here: sessions of one subject are not independent of each other, and the usual intervals would be too narrow. Choose one value for each subject to see them.'

/**
 * The two-by-two table at a cut-off and all that it tells, each with n/N and interval. Where several
 * sessions of a subject are in it, estimates stand without intervals.
 * @param cutOff in the analyte's unit
 * @throws StatisticsError one-class, non-finite, too-few
 */
export function accuracyAtCutOffOf(
  values: AccuracyValues,
  cutOff: number,
  { direction, confidence: level, prevalence, sampling }: AtCutOff,
): AccuracyAtCutOffResult {
  const { present, absent } = values
  const table = twoByTwo({ present, absent, direction }, cutOff)
  const at = accuracyAtCutOff(table, { level })
  const measures: MeasureRow[] = [
    proportionRow('sensitivity', at.sensitivity),
    proportionRow('specificity', at.specificity),
    plainRow('likelihoodRatioPositive', at.likelihoodRatioPositive),
    plainRow('likelihoodRatioNegative', at.likelihoodRatioNegative),
    plainRow('diagnosticOddsRatio', at.diagnosticOddsRatio),
  ]
  const observed = observedPredictiveValues(table, sampling, { level })
  if (observed.shown)
    measures.push(
      proportionRow('positivePredictiveValueObserved', observed.positive),
      proportionRow('negativePredictiveValueObserved', observed.negative),
    )
  if (prevalence !== null) {
    const { positive, negative } = predictiveValuesAtPrevalence(table, prevalence, { level })
    measures.push(
      plainRow('positivePredictiveValueAtPrevalence', positive),
      plainRow('negativePredictiveValueAtPrevalence', negative),
    )
  }
  const clustered = values.presentSubjects !== null
  return {
    cutOff,
    table,
    measures: clustered ? measures.map(withoutInterval) : measures,
    observedPredictiveValuesHidden: observed.shown ? null : observed.sentence,
    caveat: clustered ? SESSIONS_TOGETHER : null,
  }
}

function proportionRow(measure: Measure, of: ProportionEstimate): MeasureRow {
  return { ...plainRow(measure, of), numerator: of.numerator, denominator: of.denominator }
}

function plainRow(
  measure: Measure,
  of: ProportionEstimate | RatioEstimate | PredictiveValue,
): MeasureRow {
  const { estimate, lower, upper, method, notDefined } = of
  const note = notDefined?.sentence ?? null
  return { measure, numerator: null, denominator: null, estimate, lower, upper, method, note }
}

const withoutInterval = (row: MeasureRow): MeasureRow => ({ ...row, lower: null, upper: null })
