import type { ReportBlock, ReportDocument, ReportSection } from '#server/reports/reportDocument.ts'
import { headlineOf } from '#shared/analyses/headlineOf.ts'
import type { AgreementResult } from '#shared/schemas/agreement.ts'
import type { AnalysisResult } from '#shared/schemas/analysis.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { METHODS } from '#shared/statistics/METHODS.ts'
import { ANALYSIS_BADGE_LABELS, ANALYSIS_KIND_LABELS } from '#shared/terms/analysis.ts'
import { headlineTexts } from '#shared/terms/resultText.ts'
import type { ReportSource, StoredAnalysis } from '../reportSource.ts'
import { accuracyBlocks } from './accuracyBlocks.tsx'
import { agreementBlocks } from './agreementBlocks.tsx'
import { analysisFacts, countedInWords } from './analysisFacts.ts'
import { comparisonBlocks } from './comparisonBlocks.tsx'
import { correlationBlocks } from './correlationBlocks.ts'
import { panelBlocks } from './panelBlocks.tsx'
import { precisionBlocks } from './precisionBlocks.ts'
import { reportFrame, shownOfRun } from './reportFrame.ts'

/** The part for oversight and analysts: each chosen stored analysis with its figures and numbers. */
export function closedPart(source: ReportSource): ReportDocument {
  return reportFrame(source, 'closed', [
    summarySection(source),
    methodsSection(source),
    ...source.analyses.map((analysis) => analysisSection(source, analysis)),
  ])
}

/** One line for each analysis. */
function summarySection(source: ReportSource): ReportSection {
  const { protocol } = source.dataset
  return {
    heading: 'What is shown',
    blocks: [
      {
        kind: 'paragraph',
        text: `${shownOfRun(source.analyses.length, source.analysesRun)}. Every number is the stored one; each estimate stands with what it was counted from and its interval.`,
      },
      {
        kind: 'keyValues',
        pairs: [
          { label: 'Target condition', value: protocol.targetCondition },
          { label: 'Reference standard', value: protocol.referenceStandard },
        ],
      },
      {
        kind: 'table',
        columns: [
          { label: 'Analysis' },
          { label: 'Counted' },
          { label: 'Result with its interval' },
        ],
        rows: source.analyses.map((analysis) => [
          `${analysis.number}. ${analysis.title}\n${ANALYSIS_KIND_LABELS[analysis.kind]}, ${ANALYSIS_BADGE_LABELS[analysis.badge].toLowerCase()}`,
          countedInWords(analysis.result),
          headlineText(analysis.result),
        ]),
      },
    ],
  }
}

const NO_PARTS = {
  area: null,
  bias: null,
  difference: null,
  rankCorrelation: null,
  withinSubjectSd: null,
  scale: null,
  sd: null,
  unit: null,
}

function headlineText(result: AnalysisResult): string {
  const { figure, interval } = headlineTexts(
    headlineOf(result.kind, { ...NO_PARTS, ...differenceOf(result), ...result }),
  )
  return interval ? `${figure}\n(${interval})` : figure
}

const differenceOf = (result: AnalysisResult) =>
  result.kind === 'comparison' ? { difference: result.comparisons[0]?.difference ?? null } : {}

function analysisSection(source: ReportSource, analysis: StoredAnalysis): ReportSection {
  return {
    heading: `${analysis.number}. ${analysis.title}`,
    newPage: true,
    blocks: [...analysisFacts(source, analysis), ...resultBlocks(source, analysis)],
  }
}

function resultBlocks(source: ReportSource, analysis: StoredAnalysis): ReportBlock[] {
  const { result } = analysis
  switch (result.kind) {
    case 'accuracy':
      return accuracyBlocks(source, analysis, result)
    case 'agreement':
      return agreementBlocks(source, analysis, result)
    case 'comparison':
      return comparisonBlocks(analysis, result)
    case 'panel':
      return panelBlocks(analysis, result)
    case 'precision':
      return precisionBlocks(analysis, result)
    case 'correlation':
      return correlationBlocks(analysis, result)
  }
}

/** Name and source of every method that an interval in this part was computed by. */
function methodsSection({ analyses }: ReportSource): ReportSection {
  const used = new Set(analyses.flatMap(({ result }) => methodNames(result)))
  const rows = [...Object.values(METHODS), ...Object.values(AGREEMENT_METHODS)]
    .filter(({ name }) => used.has(name))
    .map(({ name, source }) => [name, source])
  const versions = [...new Set(analyses.map((analysis) => analysis.statisticsVersion))].join(', ')
  const blocks: ReportBlock[] = [
    { kind: 'paragraph', text: `Computed with statistics version ${versions}.` },
  ]
  if (rows.length > 0)
    blocks.unshift({ kind: 'table', columns: [{ label: 'Method' }, { label: 'Source' }], rows })
  return { heading: 'Methods of the intervals', blocks }
}

function methodNames(result: AnalysisResult): string[] {
  if (result.kind === 'agreement') return agreementMethods(result)
  if (result.kind === 'correlation') return [result.rankCorrelation.method]
  if (result.kind === 'precision')
    return [result.withinSubjectSd.method, ...(result.intraclass ?? []).map((each) => each.method)]
  if (result.kind === 'comparison') return result.curves.flatMap(({ area }) => area?.method ?? [])
  if (result.kind === 'panel') return []
  return [
    ...(result.area ? [result.area.method] : []),
    ...(result.atCutOff?.measures.map((measure) => measure.method) ?? []),
  ]
}

function agreementMethods({ biasMethod, limitsMethod, comparison }: AgreementResult): string[] {
  const drawn = comparison
    ? [...comparison.lines, comparison.concordance, comparison.pearson, comparison.spearman]
    : []
  return [biasMethod, limitsMethod, ...drawn.map(({ method }) => method)]
}
