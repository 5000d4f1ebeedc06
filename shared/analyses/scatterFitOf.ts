import type { MethodComparison } from '#shared/schemas/agreement.ts'
import { FITTED_LINE_LABELS, type FittedLine } from '#shared/terms/agreementTerms.ts'

export type ScatterFit = { label: string; intercept: number; slope: number }

/** A fitted line to draw; null where it could not be fitted. */
export function scatterFitOf({ lines }: MethodComparison, wanted: FittedLine): ScatterFit | null {
  const found = lines.find(({ line }) => line === wanted)
  if (found?.intercept.estimate == null || found.slope.estimate === null) return null
  return {
    label: FITTED_LINE_LABELS[wanted],
    intercept: found.intercept.estimate,
    slope: found.slope.estimate,
  }
}
