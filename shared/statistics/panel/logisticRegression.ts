import { chiSquaredUpperTail } from '../distributions/chiSquaredUpperTail.ts'
import { normalTwoSided } from '../distributions/normalTwoSided.ts'
import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { fitLogistic, type LogisticData } from './fitLogistic.ts'

export type LogisticTerm = {
  term: string
  estimate: number
  standardError: number
  z: number
  p: number
  /**
   * exp(estimate) for one unit of the predictor, with its Wald interval; null where the unit is so large
   * beside the predictor's spread that they leave the range of numbers: express it in a smaller unit.
   */
  oddsRatio: number | null
  oddsRatioInterval: Interval | null
}

export type LogisticRegression = {
  n: number
  nPresent: number
  /** '(Intercept)' first, then the predictors in order. */
  terms: LogisticTerm[]
  /** Inverse information at the estimate, row by row in the order of the terms. */
  covariance: number[][]
  /** In the order of the subjects. */
  fitted: Float64Array
  logLikelihood: number
  deviance: number
  nullDeviance: number
  likelihoodRatio: { chiSquared: number; df: number; p: number }
  aic: number
  mcFaddenR2: number
  nagelkerkeR2: number
}

/**
 * Logistic regression of the outcome on one or more predictors, by unpenalised maximum likelihood.
 * @param data complete cases: columns of equal length, outcomes 1/true = present; more subjects than terms
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'one-class', 'constant',
 * 'collinear', 'separation' (a combination of predictors tells the classes apart without error)
 * Source: McCullagh & Nelder 1989, Generalized Linear Models, ch. 4; Nagelkerke 1991, Biometrika 78:691.
 */
export function logisticRegression(
  data: LogisticData,
  { level = 0.95 }: LevelOption = {},
): LogisticRegression {
  const fit = fitLogistic(data)
  const { n, nPresent, coefficients, covariance, fitted, logLikelihood } = fit
  const z95 = zFor(level)
  const names = ['(Intercept)', ...data.predictors.map(({ name }) => name)]
  const terms = names.map((term, k) => {
    const estimate = coefficients[k]!
    const standardError = Math.sqrt(covariance[k]![k]!)
    const z = estimate / standardError
    const upper = Math.exp(estimate + z95 * standardError)
    const representable = Number.isFinite(upper)
    const p = normalTwoSided(z)
    return {
      term,
      estimate,
      standardError,
      z,
      p,
      oddsRatio: representable ? Math.exp(estimate) : null,
      oddsRatioInterval: representable
        ? { lower: Math.exp(estimate - z95 * standardError), upper }
        : null,
    }
  })
  const share = nPresent / n
  const nullLogLikelihood = nPresent * Math.log(share) + (n - nPresent) * Math.log(1 - share)
  const chiSquared = Math.max(0, 2 * (logLikelihood - nullLogLikelihood))
  const df = data.predictors.length
  return {
    n,
    nPresent,
    terms,
    covariance,
    fitted,
    logLikelihood,
    deviance: -2 * logLikelihood,
    nullDeviance: -2 * nullLogLikelihood,
    likelihoodRatio: { chiSquared, df, p: chiSquaredUpperTail(chiSquared, df) },
    aic: -2 * logLikelihood + 2 * (df + 1),
    mcFaddenR2: 1 - logLikelihood / nullLogLikelihood,
    nagelkerkeR2: (1 - Math.exp(-chiSquared / n)) / (1 - Math.exp((2 * nullLogLikelihood) / n)),
  }
}
