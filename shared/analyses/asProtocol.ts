import type { AccuracyParameters, AnalysisParameters } from '#shared/schemas/analysis.ts'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'

/** The cut-off that a protocol plans for an analyte in this direction, or null. */
export function plannedCutOff(
  protocol: ProtocolDocument,
  { analyteKey, direction }: Pick<AccuracyParameters, 'analyteKey' | 'direction'>,
): number | null {
  const biomarker = protocol.biomarkers.find(
    (each) => each.analyteKey === analyteKey && each.direction === direction,
  )
  return biomarker?.plannedCutOff ?? null
}

/**
 * Whether an analysis uses what the protocol states: analyte, direction and planned cut-off, or the
 * analyte's acceptance limits.
 */
export function asProtocol(protocol: ProtocolDocument, parameters: AnalysisParameters): boolean {
  if (parameters.kind === 'accuracy') {
    const planned = plannedCutOff(protocol, parameters)
    return planned !== null && planned === parameters.cutOff
  }
  // The protocol plans nothing of the other kinds yet.
  if (parameters.kind !== 'agreement') return false
  const { analyteKey, acceptance, scale } = parameters
  // The protocol's limits are differences in the analyte's unit.
  if (scale !== 'difference') return false
  const limits = protocol.acceptanceLimits.find((each) => each.analyteKey === analyteKey)
  return (
    limits !== undefined && limits.lower === acceptance?.lower && limits.upper === acceptance.upper
  )
}
