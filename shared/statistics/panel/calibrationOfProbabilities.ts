import { StatisticsError } from '../StatisticsError.ts'
import { fitLogistic } from './fitLogistic.ts'

export type CalibrationOfProbabilities = {
  /** Of the outcome on the probabilities' logits: 1 and 0 where they are right. */
  slope: number
  intercept: number
  meanFitted: number
  prevalence: number
}

/**
 * Whether predicted probabilities mean what they say: logistic regression of the outcome on their logits.
 * On the data a model was fitted to, slope 1 and intercept 0 hold by construction and prove nothing.
 * @param probabilities strictly between 0 and 1  @param outcomes 1/true = present
 * @throws StatisticsError 'out-of-range', and as logisticRegression
 * Source: Cox 1958, Biometrika 45:562; Steyerberg 2019, Clinical Prediction Models, ch. 15.
 */
export function calibrationOfProbabilities(
  probabilities: ArrayLike<number>,
  outcomes: ArrayLike<boolean | number>,
): CalibrationOfProbabilities {
  const logits = Float64Array.from(probabilities, (p) => {
    if (!(p > 0 && p < 1)) {
      throw new StatisticsError('out-of-range', 'A probability of 0 or 1 has no logit.')
    }
    return Math.log(p / (1 - p))
  })
  const fit = fitLogistic({ predictors: [{ name: 'logit', values: logits }], outcomes })
  const n = fit.n
  let sum = 0
  for (let i = 0; i < n; i++) sum += probabilities[i]!
  return {
    slope: fit.coefficients[1]!,
    intercept: fit.coefficients[0]!,
    meanFitted: sum / n,
    prevalence: fit.nPresent / n,
  }
}
