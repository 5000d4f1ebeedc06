import { asProtocol } from '#shared/analyses/asProtocol.ts'
import { headlineOf } from '#shared/analyses/headlineOf.ts'
import {
  type Analysis,
  type AnalysisSummary,
  analysisParameters,
  analysisResult,
} from '#shared/schemas/analysis.ts'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import type { AnalysisRow, AnalysisSummaryRow } from './analyses.reads.ts'

export function toAnalysisSummary(row: AnalysisSummaryRow): AnalysisSummary {
  return {
    ...row,
    runAt: row.runAt.toISOString(),
    runByName: row.runByName ?? '',
    headline: headlineOf(row.kind, row),
    caution: CAUTIONS[row.protocol.regulatoryStatus],
  }
}

export function toAnalysis(row: AnalysisRow): Analysis {
  const parameters = analysisParameters.parse(row.parameters)
  return {
    ...row,
    ...toAnalysisSummary(row),
    parameters,
    result: analysisResult.parse(JSON.parse(row.result)),
    asProtocol: asProtocol(row.protocol, parameters),
    targetCondition: row.protocol.targetCondition,
    referenceStandard: row.protocol.referenceStandard,
    frozenAt: row.frozenAt.toISOString(),
  }
}
