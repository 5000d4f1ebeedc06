import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import {
  type AgreementScale,
  MIDDLE_LINE_LABELS,
  SCALE_UNITS,
} from '#shared/terms/agreementTerms.ts'
import type { AnalysisKind } from '#shared/terms/analysis.ts'
import { agreementDecimals } from '#shared/terms/resultText.ts'

type Line = { estimate: number; lower: number | null; upper: number | null }

/** The parts of a stored result that a headline is made of; what a kind does not have is null. */
export type HeadlineParts = {
  area: Line | null
  bias: Line | null
  /** Of the first two areas compared. */
  difference: Line | null
  rankCorrelation: Line | null
  withinSubjectSd: Line | null
  /** Of an agreement; null in those stored before there were several. */
  scale: AgreementScale | null
  sd: number | null
  unit: string | null
}

/** The one figure that an analysis is listed by, in lists, reports and on its own page. */
export function headlineOf(kind: AnalysisKind, parts: HeadlineParts): AnalysisSummary['headline'] {
  const { area, bias, difference, rankCorrelation, withinSubjectSd, scale, sd, unit } = parts
  const plain = { unit: null, decimals: 3 }
  if (kind === 'accuracy') return area && { label: 'Area', ...only(area), ...plain }
  if (kind === 'panel') return area && { label: 'Corrected area', ...only(area), ...plain }
  if (kind === 'comparison')
    return difference && { label: 'Difference of areas', ...only(difference), ...plain }
  if (kind === 'correlation')
    return rankCorrelation && { label: 'Rank correlation', ...only(rankCorrelation), ...plain }
  if (kind === 'precision') {
    const decimals = agreementDecimals(withinSubjectSd?.estimate ?? 0)
    return (
      withinSubjectSd && { label: 'Within-subject SD', ...only(withinSubjectSd), unit, decimals }
    )
  }
  const shown = scale ?? 'difference'
  return (
    bias && {
      label: MIDDLE_LINE_LABELS[shown],
      ...only(bias),
      unit: SCALE_UNITS[shown] ?? unit,
      decimals: agreementDecimals(sd ?? 0),
    }
  )
}

const only = ({ estimate, lower, upper }: Line): Line => ({ estimate, lower, upper })
