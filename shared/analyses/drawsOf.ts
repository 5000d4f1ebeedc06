import type { AnalysisParameters } from '#shared/schemas/analysis.ts'
import type { ResamplingChoice } from '#shared/schemas/resampling.ts'

/** The random draws that an analysis makes, or null: what draws takes a while, and runs as a job. */
export function drawsOf(parameters: AnalysisParameters): ResamplingChoice | null {
  switch (parameters.kind) {
    case 'accuracy':
    case 'panel':
      return parameters.resampling
    case 'comparison':
      return parameters.compare.design === 'paired' ? parameters.compare.permutations : null
    default:
      return null
  }
}
