import type { AreaEstimate } from '#shared/schemas/estimate.ts'
import type { ResamplingChoice } from '#shared/schemas/resampling.ts'
import { bootstrapArea } from '#shared/statistics/accuracy/bootstrapArea.ts'
import { bootstrapClusteredArea } from '#shared/statistics/accuracy/bootstrapClusteredArea.ts'
import { clusteredArea } from '#shared/statistics/accuracy/clusteredArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import type { RocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { AreaIntervalChoice } from '#shared/terms/analysis.ts'
import type { AccuracyValues } from './accuracyValues.ts'

export type AreaChoice = {
  confidence: number
  areaInterval?: AreaIntervalChoice | undefined
  resampling?: ResamplingChoice | null | undefined
  onProgress?: ((share: number) => void) | undefined
}

/**
 * The area under a curve with the interval that was chosen; several sessions of a subject are one
 * cluster.
 * @throws StatisticsError 'out-of-range' (logit interval of clusters; a bootstrap without its draws)
 */
export function areaEstimateOf(
  values: AccuracyValues,
  curve: RocCurve,
  { confidence: level, areaInterval = 'delong', resampling, onProgress }: AreaChoice,
): AreaEstimate {
  const clusters = clustersOf(values, curve)
  const found = clusters
    ? clusteredArea(clusters, { level })
    : delongArea(curve, { level, scale: areaInterval === 'logit' ? 'logit' : 'plain' })
  const { area, standardError, shown, notEstimable } = found
  if (areaInterval === 'logit' && clusters)
    throw new StatisticsError(
      'out-of-range',
      'The logit interval is for one value a subject. Choose DeLong or the bootstrap, which take subjects as clusters, or one value for each subject.',
    )
  const estimated = { estimate: area, standardError, note: notEstimable?.sentence ?? null }
  // A bootstrap of classes that never overlap has no width, which would say too much.
  if (areaInterval !== 'bootstrap' || notEstimable)
    return { ...estimated, lower: shown.lower, upper: shown.upper, method: shown.method }
  if (!resampling)
    throw new StatisticsError('out-of-range', 'A bootstrap interval needs a seed and replicates.')
  const draws = { level, ...resampling, ...(onProgress ? { onProgress } : {}) }
  const { lower, upper, method } = clusters
    ? bootstrapClusteredArea(clusters, draws)
    : bootstrapArea(curve, draws)
  return { ...estimated, lower, upper, method }
}

function clustersOf(
  { present, absent, presentSubjects, absentSubjects }: AccuracyValues,
  { direction }: RocCurve,
) {
  return presentSubjects && absentSubjects
    ? { present, absent, direction, presentSubjects, absentSubjects }
    : null
}
