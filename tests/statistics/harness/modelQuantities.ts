import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { netBenefit } from '#shared/statistics/cutOffs/netBenefit.ts'
import { brierScore } from '#shared/statistics/panel/brierScore.ts'
import { calibrationOfProbabilities } from '#shared/statistics/panel/calibrationOfProbabilities.ts'
import type { LogisticData } from '#shared/statistics/panel/fitLogistic.ts'
import { logisticRegression } from '#shared/statistics/panel/logisticRegression.ts'
import { classesByOutcome } from './classesByOutcome.ts'
import type { Quantities, Surroundings } from './Quantity.ts'
import { completeRows } from './rocInput.ts'

export const modelQuantities: Quantities = {
  logistic_coefficients: (s) =>
    modelOf(s).terms.map((term) => ({
      term: term.term,
      estimate: term.estimate,
      se: term.standardError,
      z: term.z,
      p: term.p,
      odds_ratio: term.oddsRatio,
      or_lower: term.oddsRatioInterval?.lower ?? null,
      or_upper: term.oddsRatioInterval?.upper ?? null,
    })),
  logistic_covariance: (s) => modelOf(s).covariance,
  logistic_fit: (s) => {
    const model = modelOf(s)
    return {
      n: model.n,
      cases: model.nPresent,
      log_likelihood: model.logLikelihood,
      deviance: model.deviance,
      null_deviance: model.nullDeviance,
      lr_chi2: model.likelihoodRatio.chiSquared,
      df: model.likelihoodRatio.df,
      p: model.likelihoodRatio.p,
      aic: model.aic,
      mcfadden_r2: model.mcFaddenR2,
      nagelkerke_r2: model.nagelkerkeR2,
    }
  },
  fitted_probabilities: (s) => [...modelOf(s).fitted],
  auc_fitted: (s) => {
    const { area, variance, plain } = delongArea(rocCurve(fittedClasses(s)))
    return {
      auc: area,
      variance,
      lower: plain?.lower ?? null,
      upper: plain?.upper ?? null,
    }
  },
  brier: (s) => brierScore(modelOf(s).fitted, dataOf(s).outcomes),
  calibration: (s) => {
    const answer = calibrationOfProbabilities(modelOf(s).fitted, dataOf(s).outcomes)
    return {
      slope: answer.slope,
      intercept: answer.intercept,
      mean_fitted: answer.meanFitted,
      prevalence: answer.prevalence,
    }
  },
  net_benefit: (s) => {
    const asked = Array.isArray(s.record.value) ? s.record.value : []
    const thresholds = asked.map((entry) => (entry as { threshold: number }).threshold)
    return netBenefit(fittedClasses(s), thresholds).map((at) => ({
      threshold: at.threshold,
      tp: at.truePositives,
      fp: at.falsePositives,
      net_benefit: at.netBenefit,
      treat_all: at.treatAll,
      treat_none: at.treatNone,
      standardised: at.standardised,
    }))
  },
}

/** "a + b": the predictors' columns, complete rows. */
function dataOf({ record, table }: Surroundings): LogisticData {
  const names = record.marker.split(' + ')
  const complete = completeRows(table(record.dataset), names)
  return {
    predictors: names.map((name) => ({ name, values: complete.numbers(name) as number[] })),
    outcomes: complete.outcomes() as boolean[],
  }
}

function modelOf(s: Surroundings) {
  return logisticRegression(dataOf(s))
}

function fittedClasses(s: Surroundings) {
  return classesByOutcome(modelOf(s).fitted, dataOf(s).outcomes as boolean[], 'higher')
}
