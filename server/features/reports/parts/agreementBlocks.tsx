import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { agreementHintWords } from '#shared/analyses/agreementHintWords.ts'
import { type AgreementPairs, agreementPairs } from '#shared/analyses/agreementPairs.ts'
import { limitsTable, lineUnit, replicatesWords } from '#shared/analyses/agreementTables.ts'
import {
  correlationsTable,
  fittedLinesTable,
  levelsTable,
} from '#shared/analyses/comparisonTables.ts'
import { differencePlotOf } from '#shared/analyses/differencePlotOf.ts'
import { outsideWords } from '#shared/analyses/outsideLimits.ts'
import { residualPlotOf } from '#shared/analyses/residualPlotOf.ts'
import { type ScatterFit, scatterFitOf } from '#shared/analyses/scatterFitOf.ts'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import { ScatterIdentity } from '#shared/figures/ScatterIdentity.tsx'
import type { AgreementParameters, AgreementResult } from '#shared/schemas/agreement.ts'
import { MIDDLE_LINE_LABELS } from '#shared/terms/agreementTerms.ts'
import { ACCEPTANCE_VERDICT_WORDS } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { agreementDecimals, lineTexts, withUnit } from '#shared/terms/resultText.ts'
import type { ReportSource, StoredAnalysis } from '../reportSource.ts'
import { resultTableBlocks } from './resultTableBlocks.ts'

type Of = { pairs: AgreementPairs; parameters: AgreementParameters; result: AgreementResult }

/** Bias and limits of agreement with their plot, how they stand to what would be acceptable, and lines. */
export function agreementBlocks(
  { rows }: ReportSource,
  { number, parameters }: StoredAnalysis,
  result: AgreementResult,
): ReportBlock[] {
  if (parameters.kind !== 'agreement') throw new Error('The parameters are of another kind.')
  const pairs = agreementPairs(rows, parameters.analyteKey, parameters.sessionRule)
  const of = { pairs, parameters, result }
  return [
    ...headBlocks(result),
    plotBlock(of, number),
    ...limitsBlocks(of),
    ...comparisonBlocks(of, number),
  ]
}

function headBlocks(result: AgreementResult): ReportBlock[] {
  const { bias, sd, scale, acceptance } = result
  const { estimate, interval } = lineTexts(bias, agreementDecimals(sd))
  const unit = lineUnit(result, unitLabel(result.unit))
  const blocks: ReportBlock[] = [
    {
      kind: 'subheading',
      text: `${MIDDLE_LINE_LABELS[scale]} ${withUnit(estimate, unit)} (${interval})`,
    },
  ]
  if (acceptance)
    blocks.push({
      kind: 'paragraph',
      text: `Acceptable: ${formatConcentration(acceptance.lower)} to ${withUnit(formatConcentration(acceptance.upper), unit)}. ${ACCEPTANCE_VERDICT_WORDS[acceptance.verdict]}`,
    })
  return blocks
}

const plotBlock = ({ pairs, result }: Of, number: number): ReportBlock => ({
  kind: 'figure',
  share: 0.94,
  caption: `Difference against mean of ${formatCount(pairs.sensor.length)} pairs of ${result.analyteName} (Bland–Altman), with the middle line, limits of agreement and their intervals.`,
  figure: (
    <DifferencePlot
      id={`analysis-${number}-difference`}
      {...differencePlotOf(pairs, result, unitLabel(result.unit))}
    />
  ),
})

function limitsBlocks({ pairs, parameters, result }: Of): ReportBlock[] {
  const unit = unitLabel(result.unit)
  const sentences = [
    replicatesWords(result, unit),
    ...result.caveats,
    ...agreementHintWords(result),
    outsideWords(pairs, result),
  ].filter((text) => text !== null)
  return [
    ...resultTableBlocks(limitsTable(result, unit, parameters.confidence)),
    ...sentences.map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}

function comparisonBlocks({ pairs, parameters, result }: Of, number: number): ReportBlock[] {
  const { comparison, comparisonWithheld } = result
  if (!comparison) return resultTableBlocks(comparisonWithheld)
  const unit = unitLabel(result.unit)
  const { confidence, errorVarianceRatio } = parameters
  const fit = scatterFitOf(comparison, 'deming')
  const at = { unit, confidence, errorVarianceRatio }
  return [
    {
      kind: 'figure',
      share: 0.62,
      caption: `Sensor against reference of ${result.analyteName}${fit ? ', with the Deming line' : ''}.`,
      figure: (
        <ScatterIdentity
          id={`analysis-${number}-scatter`}
          pairs={pairs.sensor.map((sensor, at) => ({ sensor, reference: pairs.reference[at]! }))}
          unit={unit}
          {...(fit ? { fit } : {})}
        />
      ),
    },
    ...(fit ? [residualBlock(pairs, fit, unit, number)] : []),
    ...resultTableBlocks(fittedLinesTable(comparison, at)),
    ...resultTableBlocks(levelsTable(comparison, at)),
    ...resultTableBlocks(correlationsTable(comparison, confidence)),
  ]
}

const residualBlock = (
  pairs: AgreementPairs,
  fit: ScatterFit,
  unit: string,
  number: number,
): ReportBlock => ({
  kind: 'figure',
  share: 0.8,
  caption: `Residuals of the ${fit.label} line against the reference.`,
  figure: (
    <DifferencePlot id={`analysis-${number}-residuals`} {...residualPlotOf(pairs, fit, unit)} />
  ),
})
