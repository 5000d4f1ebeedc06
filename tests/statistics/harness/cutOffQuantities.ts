import {
  type AccuracyAtCutOff,
  accuracyAtCutOff,
} from '#shared/statistics/cutOffs/accuracyAtCutOff.ts'
import { closestToCornerCutOffs } from '#shared/statistics/cutOffs/closestToCornerCutOffs.ts'
import type { CutOffPoint } from '#shared/statistics/cutOffs/cutOffPoint.ts'
import { cutOffsWithAtLeast } from '#shared/statistics/cutOffs/cutOffsWithAtLeast.ts'
import type { RatioEstimate } from '#shared/statistics/cutOffs/logRatio.ts'
import { predictiveValuesAtPrevalence } from '#shared/statistics/cutOffs/predictiveValuesAtPrevalence.ts'
import { youdenCutOffs } from '#shared/statistics/cutOffs/youdenCutOffs.ts'
import type { ProportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'
import type { Actual } from './compare.ts'
import type { Quantities, Surroundings } from './Quantity.ts'
import type { Json } from './ReferenceRecord.ts'
import { curveOf, directionsOf } from './rocInput.ts'

export const cutOffQuantities: Quantities = {
  youden: (s) => {
    const { youdenIndex, cutOffs } = youdenCutOffs(curveOf(s))
    return { j: youdenIndex, thresholds: cutOffs.map((point) => listed(point, s)) }
  },
  closest_to_0_1: (s) => {
    const { squaredDistance, cutOffs } = closestToCornerCutOffs(curveOf(s))
    return {
      distance_squared: squaredDistance,
      thresholds: cutOffs.map((point) => listed(point, s)),
    }
  },
  'sens_at_least_*': (s) => constrained(s, 'sensitivity'),
  'spec_at_least_*': (s) => constrained(s, 'specificity'),
  two_by_two_at_youden: (s) => {
    const { cutOffs } = youdenCutOffs(curveOf(s))
    const records = Array.isArray(s.record.value) ? s.record.value : []
    return cutOffs.map((point, i) => tableAt(point, s, prevalencesOf(records[i])))
  },
}

function constrained(s: Surroundings, measure: 'sensitivity' | 'specificity'): Actual {
  const least = Number(s.record.quantity.split('_').at(-1))
  const { preferred, cutOffs } = cutOffsWithAtLeast(curveOf(s), measure, least)
  return { preferred: listed(preferred, s), all_tied: cutOffs.map((point) => listed(point, s)) }
}

/** The product's null threshold (nobody positive) is the files' infinity, by direction. */
function placed(point: CutOffPoint, { record }: Surroundings) {
  const beyond = directionsOf(record.direction)[0] === 'higher' ? Infinity : -Infinity
  return {
    threshold: point.threshold ?? beyond,
    midpoint: point.midpoint ?? (point.threshold === null ? beyond : -beyond),
    tp: point.truePositives,
    fp: point.falsePositives,
    fn: point.falseNegatives,
    tn: point.trueNegatives,
  }
}

function listed(point: CutOffPoint, s: Surroundings): Actual {
  const { sensitivity, specificity } = point
  return { ...placed(point, s), sensitivity, specificity }
}

function prevalencesOf(record: Json | undefined): number[] {
  if (record === null || typeof record !== 'object' || Array.isArray(record)) return []
  const list = record.at_prevalence
  if (!Array.isArray(list)) return []
  return list.map((entry) => (entry as { prevalence: number }).prevalence)
}

function tableAt(point: CutOffPoint, s: Surroundings, prevalences: number[]): Actual {
  const wilson = accuracyAtCutOff(point)
  const exact = accuracyAtCutOff(point, { interval: 'Clopper–Pearson' })
  const proportion = (key: 'sensitivity' | 'specificity' | 'accuracy' | Predictive): Actual =>
    proportionBoth(wilson[key], exact[key])
  const { youdenIndex: j } = wilson
  return {
    ...placed(point, s),
    sensitivity: proportion('sensitivity'),
    specificity: proportion('specificity'),
    ppv: proportion('positivePredictiveValue'),
    npv: proportion('negativePredictiveValue'),
    accuracy: proportion('accuracy'),
    youden_j: {
      estimate: j.estimate,
      wald_lower: j.lower,
      wald_upper: j.upper,
      se: j.standardError,
    },
    lr_positive: ratio(wilson.likelihoodRatioPositive),
    lr_negative: ratio(wilson.likelihoodRatioNegative),
    dor: ratio(wilson.diagnosticOddsRatio),
    dor_haldane_half: ratio(wilson.diagnosticOddsRatioHalfAdded),
    at_prevalence: prevalences.map((prevalence) => atPrevalence(point, prevalence)),
  }
}

type Predictive = 'positivePredictiveValue' | 'negativePredictiveValue'

function proportionBoth(wilson: ProportionEstimate, exact: ProportionEstimate): Actual {
  return {
    x: wilson.numerator,
    n: wilson.denominator,
    estimate: wilson.estimate,
    wilson95: { lower: wilson.lower, upper: wilson.upper },
    clopper_pearson95: { lower: exact.lower, upper: exact.upper },
  }
}

function ratio({ estimate, lower, upper, standardErrorLog }: RatioEstimate): Actual {
  return { estimate, lower, upper, se_log: standardErrorLog }
}

function atPrevalence(point: AccuracyAtCutOff['table'], prevalence: number): Actual {
  const { positive, negative } = predictiveValuesAtPrevalence(point, prevalence)
  return {
    prevalence,
    ppv: positive.estimate,
    npv: negative.estimate,
    ppv_logit_ci95: { lower: positive.lower, upper: positive.upper },
    npv_logit_ci95: { lower: negative.lower, upper: negative.upper },
  }
}
