import type { ReportBlock, ReportTable } from '#server/reports/reportDocument.ts'
import { curvePoints } from '#shared/analyses/curvePoints.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import type { PanelResult } from '#shared/schemas/panel.ts'
import { formatCount, formatEstimate, formatProbability } from '#shared/terms/numbers.ts'
import { panelAreaNote, panelTermTexts } from '#shared/terms/panelText.ts'
import { intervalHeading } from '#shared/terms/resultText.ts'
import type { StoredAnalysis } from '../reportSource.ts'

/** Corrected area, coefficients, calibration and net benefit of a panel. */
export function panelBlocks(
  { number, parameters }: StoredAnalysis,
  result: PanelResult,
): ReportBlock[] {
  if (parameters.kind !== 'panel') throw new Error('The parameters are of another kind.')
  const { area, areaWithheld, caveats, brier, calibration, likelihoodRatio } = result
  const quiet = (text: string) => ({ kind: 'paragraph' as const, text, quiet: true })
  return [
    area
      ? {
          kind: 'subheading',
          text: `Corrected area under the curve ${formatEstimate(area.estimate)}`,
        }
      : { kind: 'paragraph', text: areaWithheld ?? 'No area is given.' },
    ...(area ? [quiet(panelAreaNote(area))] : []),
    {
      kind: 'figure',
      share: 0.62,
      caption: `The curve of the fitted probabilities in the data that the panel was fitted to, which flatters it: ${result.analyteName}.`,
      figure: (
        <RocCurve
          id={`analysis-${number}-roc`}
          curves={[{ label: 'Panel, as fitted', unit: '', points: curvePoints(result.curve) }]}
        />
      ),
    },
    termsTable(result, parameters.confidence),
    quiet(
      `Likelihood ratio against no analyte: χ² = ${formatEstimate(likelihoodRatio.chiSquared, 2)} on ${likelihoodRatio.df} df, p ${formatProbability(likelihoodRatio.p)}. ${parameters.scale === 'log' ? 'Odds ratios are for a factor of e (2.718).' : 'Odds ratios are for one unit.'}`,
    ),
    {
      kind: 'keyValues',
      pairs: [
        {
          label: 'Brier score',
          value: `${formatEstimate(brier.brier)}, scaled ${formatEstimate(brier.scaled)}`,
        },
        {
          label: 'Calibration',
          value: `slope ${formatEstimate(calibration.slope)}, intercept ${formatEstimate(calibration.intercept)}; mean probability ${formatEstimate(calibration.meanFitted)}, share with the condition ${formatEstimate(calibration.prevalence)}`,
        },
      ],
    },
    quiet(calibration.note),
    ...(result.netBenefit ? [benefitTable(result.netBenefit)] : []),
    ...(result.netBenefitHidden ? [quiet(result.netBenefitHidden)] : []),
    ...caveats.map(quiet),
  ]
}

function termsTable({ terms }: PanelResult, confidence: number): ReportTable {
  const heading = intervalHeading(confidence)
  return {
    kind: 'table',
    caption: 'Coefficients (logistic regression, Wald)',
    columns: [
      { label: 'Term' },
      { label: 'Coefficient', align: 'right' },
      { label: heading, align: 'right' },
      { label: 'Odds ratio', align: 'right' },
      { label: heading, align: 'right' },
      { label: 'p', align: 'right' },
    ],
    rows: terms.map((each) => {
      const { estimate, interval, oddsRatio, oddsInterval, p } = panelTermTexts(each)
      return [each.term, estimate, interval, oddsRatio, oddsInterval, p]
    }),
  }
}

const benefitTable = (rows: NonNullable<PanelResult['netBenefit']>): ReportTable => ({
  kind: 'table',
  caption: 'Net benefit of acting at a probability (Vickers & Elkin 2006, Med Decis Making 26:565)',
  columns: [
    { label: 'Probability', align: 'right' },
    { label: 'True positives', align: 'right' },
    { label: 'False positives', align: 'right' },
    { label: 'Net benefit', align: 'right' },
    { label: 'Acting on all', align: 'right' },
  ],
  rows: rows.map((row) => [
    formatEstimate(row.threshold, 2),
    formatCount(row.truePositives),
    formatCount(row.falsePositives),
    formatEstimate(row.netBenefit),
    formatEstimate(row.treatAll),
  ]),
})
