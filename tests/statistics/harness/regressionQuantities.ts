import {
  demingRegression,
  type JackknifeEstimate,
} from '#shared/statistics/agreement/demingRegression.ts'
import { ordinaryRegression } from '#shared/statistics/agreement/ordinaryRegression.ts'
import { passingBablokRegression } from '#shared/statistics/agreement/passingBablokRegression.ts'
import { xyOf } from './agreementInput.ts'
import type { Quantities, Surroundings } from './Quantity.ts'

export const regressionQuantities: Quantities = {
  regression_ols: (s) => {
    const { x, y } = xyOf(s)
    const line = ordinaryRegression(x, y)
    return {
      ...names(s),
      intercept: line.intercept,
      intercept_se: line.interceptStandardError,
      slope: line.slope,
      slope_se: line.slopeStandardError,
      residual_sd: line.residualSd,
    }
  },
  regression_deming: (s) => {
    const { x, y } = xyOf(s)
    const ratio = /error-variance ratio ([\d.]+)/.exec(s.record.method)?.[1]
    const line = demingRegression(x, y, { errorVarianceRatio: Number(ratio ?? 1) })
    return { ...names(s), intercept: jackknifed(line.intercept), slope: jackknifed(line.slope) }
  },
  regression_passing_bablok: (s) => {
    const { x, y } = xyOf(s)
    const line = passingBablokRegression(x, y)
    return {
      ...names(s),
      slope: { ...line.slope },
      intercept: { ...line.intercept },
      n_slopes: line.slopes,
      offset_K: line.offset,
      excluded_identical_points: line.identicalPoints,
      excluded_slope_minus_1: line.slopesOfMinusOne,
      M1: line.lowerRank,
      M2: line.upperRank,
    }
  },
}

function names({ given }: Surroundings) {
  return { x: String(given.x), y: String(given.y) }
}

function jackknifed({ estimate, standardError, lower, upper }: JackknifeEstimate) {
  return { estimate, jackknife_se: standardError, lower, upper }
}
