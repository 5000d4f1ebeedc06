import type {
  AccuracyParameters,
  AccuracyResult,
  AnalysisParameters,
  AnalysisResult,
} from '#shared/schemas/analysis.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { accuracyAtCutOffOf } from './accuracyAtCutOffOf.ts'
import { accuracyMoreOf } from './accuracyMoreOf.ts'
import { accuracyOverallOf } from './accuracyOverallOf.ts'
import { accuracyValues } from './accuracyValues.ts'
import { agreementResultOf } from './agreementResultOf.ts'
import { plannedCutOff } from './asProtocol.ts'
import { comparisonResultOf } from './comparisonResultOf.ts'
import { correlationResultOf } from './correlationResultOf.ts'
import type { StoredArea } from './noiseCostOf.ts'
import { panelResultOf } from './panelResultOf.ts'
import { precisionResultOf } from './precisionResultOf.ts'

/** Frozen data with the protocol that stood when they were frozen. */
export type Frozen = {
  manifest: DatasetManifest
  protocol: ProtocolDocument
  rows: readonly DatasetRow[]
  /** The stored area that a precision analysis sets against the noise; null for all others. */
  storedArea: StoredArea | null
}

/**
 * Computes an analysis from frozen rows alone: the same dataset, parameters and build give the same
 * digits.
 * @param onProgress told the share done of what is drawn at random; throw in it to stop
 * @throws StatisticsError
 */
export function resultOf(
  frozen: Frozen,
  parameters: AnalysisParameters,
  onProgress?: (share: number) => void,
): AnalysisResult {
  const { manifest, protocol, rows } = frozen
  switch (parameters.kind) {
    case 'accuracy':
      return accuracyResult(frozen, parameters, onProgress)
    case 'agreement':
      return agreementResultOf(rows, manifest.analytes, parameters)
    case 'correlation':
      return correlationResultOf(rows, manifest.analytes, parameters)
    case 'precision':
      return precisionResultOf(frozen, parameters)
    case 'comparison':
      return comparisonResultOf(rows, manifest.analytes, parameters, onProgress)
    case 'panel':
      return panelResultOf(rows, manifest.analytes, parameters, protocol.sampling, onProgress)
  }
}

function accuracyResult(
  { manifest, protocol, rows }: Frozen,
  parameters: AccuracyParameters,
  onProgress?: (share: number) => void,
): AccuracyResult {
  const { analyteKey, sessionRule, cutOff, areaInterval } = parameters
  const { sampling } = protocol
  const values = accuracyValues(rows, analyteKey, sessionRule)
  // The interval draws first, then the cut-offs: a half of the bar for each where both draw.
  const half = areaInterval === 'bootstrap'
  const overall = accuracyOverallOf(values, {
    ...parameters,
    onProgress: (share) => onProgress?.(share / 2),
  })
  const atCutOff =
    cutOff === null ? null : accuracyAtCutOffOf(values, cutOff, { ...parameters, sampling })
  const later = (share: number) => onProgress?.(half ? 0.5 + share / 2 : share)
  return {
    kind: 'accuracy',
    ...measured(manifest, analyteKey),
    counts: values.counts,
    plannedCutOff: plannedCutOff(protocol, parameters),
    ...overall,
    atCutOff,
    ...accuracyMoreOf({ rows, values, overall, atCutOff }, parameters, later),
  }
}

function measured(manifest: DatasetManifest, analyteKey: string) {
  const found = manifest.analytes.find((analyte) => analyte.key === analyteKey)
  if (!found) throw new Error(`The dataset holds no ${analyteKey}.`)
  return { analyteName: found.name, unit: found.unit }
}
