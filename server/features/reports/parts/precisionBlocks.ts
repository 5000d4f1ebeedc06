import type { ReportBlock } from '#server/reports/reportDocument.ts'
import {
  intraclassTable,
  noiseTable,
  precisionTable,
  sessionsWords,
} from '#shared/analyses/precisionTables.ts'
import type { PrecisionResult } from '#shared/schemas/precision.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { agreementDecimals, lineTexts, withUnit } from '#shared/terms/resultText.ts'
import type { StoredAnalysis } from '../reportSource.ts'
import { resultTableBlocks } from './resultTableBlocks.ts'

/** How readings repeat from session to session, and what their noise costs an area. */
export function precisionBlocks(
  { parameters }: StoredAnalysis,
  result: PrecisionResult,
): ReportBlock[] {
  if (parameters.kind !== 'precision') throw new Error('The parameters are of another kind.')
  const { confidence, reliabilityWanted, measuredBy } = parameters
  const { withinSubjectSd } = result
  const { estimate, interval } = lineTexts(
    withinSubjectSd,
    agreementDecimals(withinSubjectSd.estimate),
  )
  const whose = measuredBy === 'sensor' ? 'the sensor' : 'the reference analyser'
  return [
    {
      kind: 'subheading',
      text: `Within-subject SD ${withUnit(estimate, unitLabel(result.unit))} (${interval})`,
    },
    { kind: 'paragraph', text: `Readings of ${whose}.`, quiet: true },
    ...resultTableBlocks(precisionTable(result, confidence)),
    ...result.caveats.map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
    ...resultTableBlocks(intraclassTable(result, confidence)),
    { kind: 'paragraph', text: sessionsWords(result, reliabilityWanted) },
    ...resultTableBlocks(noiseTable(result)),
  ]
}
