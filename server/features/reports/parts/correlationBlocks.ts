import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { correlationTable } from '#shared/analyses/correlationTable.ts'
import type { CorrelationResult } from '#shared/schemas/agreement.ts'
import { formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import type { StoredAnalysis } from '../reportSource.ts'
import { resultTableBlocks } from './resultTableBlocks.ts'

/** What can be said of two different measurands: whether their ranks go together. */
export function correlationBlocks(
  { parameters }: StoredAnalysis,
  result: CorrelationResult,
): ReportBlock[] {
  const { estimate, lower, upper } = result.rankCorrelation
  return [
    {
      kind: 'subheading',
      text: `Rank correlation ${formatEstimate(estimate)} (${formatInterval(lower, upper)})`,
    },
    {
      kind: 'paragraph',
      text: `${result.analyteName} by the sensor, ${result.referenceName} by the reference analyser.`,
      quiet: true,
    },
    ...resultTableBlocks(correlationTable(result, parameters.confidence)),
  ]
}
