import type { Predictor } from './fitLogistic.ts'

/** intercept + Σ coefficient·value for each subject: ranks subjects as the fitted probabilities do. */
export function linearScores(coefficients: number[], predictors: Predictor[]): Float64Array {
  const n = predictors[0]?.values.length ?? 0
  const scores = new Float64Array(n).fill(coefficients[0]!)
  predictors.forEach(({ values }, k) => {
    for (let i = 0; i < n; i++) scores[i]! += coefficients[k + 1]! * values[i]!
  })
  return scores
}
