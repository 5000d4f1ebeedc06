import type { AccuracyOptions, SuccessVerdict } from '#shared/schemas/accuracyMore.ts'
import type { AccuracyAtCutOffResult } from '#shared/schemas/analysis.ts'
import type { AreaEstimate } from '#shared/schemas/estimate.ts'
import { successCriterion } from '#shared/statistics/accuracy/successCriterion.ts'

const MEASURES = ['sensitivity', 'specificity', 'area'] as const

/** Whether the lower ends of the intervals lie above every floor that was set. */
export function successVerdictOf(
  floors: NonNullable<AccuracyOptions['floors']>,
  area: AreaEstimate | null,
  atCutOff: AccuracyAtCutOffResult | null,
): SuccessVerdict {
  return successCriterion(
    MEASURES.flatMap((measure) => {
      const floor = floors[measure]
      if (floor === null) return []
      const found =
        measure === 'area' ? area : atCutOff?.measures.find((each) => each.measure === measure)
      return [{ measure, floor, estimate: found?.estimate ?? null, lower: found?.lower ?? null }]
    }),
  )
}
