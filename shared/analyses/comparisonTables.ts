import type { MethodComparison } from '#shared/schemas/agreement.ts'
import type { Estimate } from '#shared/schemas/estimate.ts'
import { FITTED_LINE_LABELS } from '#shared/terms/agreementTerms.ts'
import { formatConcentration, formatEstimate, NOT_ESTIMABLE } from '#shared/terms/numbers.ts'
import {
  agreementDecimals,
  intervalHeading,
  lineTexts,
  withUnit,
} from '#shared/terms/resultText.ts'
import type { ResultTable } from './ResultTable.ts'

type Part = { estimate: number | null; lower: number | null; upper: number | null }

const noted = (name: string, note: string | null): string[] => (note ? [`${name}: ${note}`] : [])

const texts = (part: Part, decimals: number): [string, string] => {
  if (part.estimate === null) return [NOT_ESTIMABLE, NOT_ESTIMABLE]
  const { estimate, interval } = lineTexts({ ...part, estimate: part.estimate }, decimals)
  return [estimate, interval]
}

/** Lines of the sensor on the reference with their intervals. */
export function fittedLinesTable(
  { lines, sd }: MethodComparison,
  at: { unit: string; confidence: number; errorVarianceRatio: number },
): ResultTable {
  const decimals = agreementDecimals(sd)
  return {
    caption: 'Lines of the sensor on the reference',
    columns: [
      { header: 'Line' },
      { header: `Intercept${at.unit ? ` (${at.unit})` : ''}`, numeric: true },
      { header: `${intervalHeading(at.confidence)} of the intercept`, numeric: true },
      { header: 'Slope', numeric: true },
      { header: `${intervalHeading(at.confidence)} of the slope`, numeric: true },
    ],
    rows: lines.map(({ line, intercept, slope }) => [
      FITTED_LINE_LABELS[line],
      ...texts(intercept, decimals),
      ...texts(slope, 3),
    ]),
    notes: [
      `Deming with the sensor’s error variance at ${formatConcentration(at.errorVarianceRatio)} times the reference’s, as stated by the analyst. Intervals: ${lines.map(({ method }) => method).join('; ')}. Ordinary regression takes the reference as free of error and flattens the slope where it is not.`,
      ...lines.flatMap(({ line, note }) => noted(FITTED_LINE_LABELS[line], note)),
    ],
  }
}

/** Concordance and correlations with their intervals. */
export function correlationsTable(
  { concordance, pearson, spearman }: MethodComparison,
  confidence: number,
): ResultTable {
  const row = (name: string, each: Estimate) => [name, ...texts(each, 3), each.method]
  return {
    caption: 'Concordance and correlation',
    columns: [
      { header: 'Coefficient' },
      { header: 'Estimate', numeric: true },
      { header: intervalHeading(confidence), numeric: true },
      { header: 'Method' },
    ],
    rows: [
      row('Lin’s concordance', concordance),
      row('Pearson', pearson),
      row('Spearman', spearman),
    ],
    notes: [
      'All of these grow with how much subjects differ from each other, so none of them shows agreement on its own: read them beside the limits.',
      ...noted('Lin’s concordance', concordance.note),
      ...noted('Pearson', pearson.note),
      ...noted('Spearman', spearman.note),
    ],
  }
}

/** Bias at the levels that the analyst asked for; null where none was. */
export function levelsTable(
  { levels, sd }: MethodComparison,
  at: { unit: string; confidence: number },
): ResultTable | null {
  if (levels.length === 0) return null
  const decimals = agreementDecimals(sd)
  const inUnit = at.unit ? ` (${at.unit})` : ''
  return {
    caption: 'Bias at decision levels',
    columns: [
      { header: 'Reference' },
      { header: `Bias${inUnit}`, numeric: true },
      { header: `${intervalHeading(at.confidence)}${inUnit}`, numeric: true },
      { header: 'Bias (%)', numeric: true },
    ],
    rows: levels.map((each) => [
      withUnit(formatConcentration(each.level), at.unit),
      ...texts(each, decimals),
      formatEstimate(each.percent, 1),
    ]),
    notes: ['From the Deming line, intervals by jackknife (CLSI EP09-A3).'],
  }
}
