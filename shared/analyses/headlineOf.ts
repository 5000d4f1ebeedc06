import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import type { AnalysisKind } from '#shared/terms/analysis.ts'
import { agreementDecimals } from '#shared/terms/resultText.ts'

type Line = { estimate: number; lower: number | null; upper: number | null }

/** The parts of a stored result that a headline is made of; what a kind does not have is null. */
export type HeadlineParts = {
  area: Line | null
  bias: Line | null
  sd: number | null
  unit: string | null
}

/** The one figure that an analysis is listed by, in lists, reports and on its own page. */
export function headlineOf(
  kind: AnalysisKind,
  { area, bias, sd, unit }: HeadlineParts,
): AnalysisSummary['headline'] {
  if (kind === 'accuracy') return area && { label: 'Area', ...only(area), unit: null, decimals: 3 }
  return bias && { label: 'Bias', ...only(bias), unit, decimals: agreementDecimals(sd ?? 0) }
}

const only = ({ estimate, lower, upper }: Line): Line => ({ estimate, lower, upper })
