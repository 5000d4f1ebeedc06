import type { CorrelationResult } from '#shared/schemas/agreement.ts'
import { formatEstimate, formatInterval, formatProbability } from '#shared/terms/numbers.ts'
import { intervalHeading } from '#shared/terms/resultText.ts'
import type { ResultTable } from './ResultTable.ts'

/** Rank correlation of two measurands. */
export function correlationTable(
  { rankCorrelation, p }: Pick<CorrelationResult, 'rankCorrelation' | 'p'>,
  confidence: number,
): ResultTable {
  const { estimate, lower, upper, method, note } = rankCorrelation
  return {
    caption: 'Rank correlation',
    columns: [
      { header: 'Coefficient' },
      { header: 'Estimate', numeric: true },
      { header: intervalHeading(confidence), numeric: true },
      { header: 'p', numeric: true },
    ],
    rows: [
      [
        'Spearman',
        formatEstimate(estimate),
        lower === null || upper === null ? 'none' : formatInterval(lower, upper),
        p === null ? '' : formatProbability(p),
      ],
    ],
    notes: [
      `It tells whether subjects with more of the one have more of the other, not whether the two agree. Interval: ${method}.`,
      ...(note ? [note] : []),
    ],
  }
}
