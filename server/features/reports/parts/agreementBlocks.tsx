import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { agreementPairs } from '#shared/analyses/agreementPairs.ts'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import type { AgreementResult } from '#shared/schemas/analysis.ts'
import { ACCEPTANCE_VERDICT_WORDS } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration, formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import {
  agreementDecimals,
  intervalHeading,
  lineTexts,
  withUnit,
} from '#shared/terms/resultText.ts'
import type { ReportSource, StoredAnalysis } from '../reportSource.ts'

type Line = AgreementResult['bias']

/** Bias and limits of agreement, the plot of differences, and how they stand to what would be acceptable. */
export function agreementBlocks(
  { rows }: ReportSource,
  { number, parameters }: StoredAnalysis,
  result: AgreementResult,
): ReportBlock[] {
  const { acceptance, bias, lowerLimit, upperLimit } = result
  const unit = unitLabel(result.unit)
  const inUnit = unit ? ` (${unit})` : ''
  const decimals = agreementDecimals(result.sd)
  const pairs = agreementPairs(rows, parameters.analyteKey, parameters.sessionRule)
  return [
    {
      kind: 'subheading',
      text: `Bias ${withUnit(lineTexts(bias, decimals).estimate, unit)} (${lineTexts(bias, decimals).interval})`,
    },
    {
      kind: 'paragraph',
      quiet: true,
      text: `Difference = sensor − reference. Standard deviation of the differences ${withUnit(formatEstimate(result.sd, decimals), unit)}.`,
    },
    ...(acceptance
      ? [
          {
            kind: 'paragraph' as const,
            text: `Acceptable: ${formatConcentration(acceptance.lower)} to ${withUnit(formatConcentration(acceptance.upper), unit)}. ${ACCEPTANCE_VERDICT_WORDS[acceptance.verdict]}`,
          },
        ]
      : []),
    {
      kind: 'figure',
      share: 0.94,
      caption: `Difference against mean of ${formatCount(pairs.sensor.length)} pairs of ${result.analyteName} (Bland–Altman), with bias, limits of agreement and their intervals.`,
      figure: (
        <DifferencePlot
          id={`analysis-${number}-difference`}
          unit={unit}
          pairs={pairs.sensor.map((sensor, at) => {
            const reference = pairs.reference[at]!
            return { mean: (sensor + reference) / 2, difference: sensor - reference }
          })}
          bias={drawn(bias)}
          lowerLimit={drawn(lowerLimit)}
          upperLimit={drawn(upperLimit)}
          {...(acceptance ? { acceptance } : {})}
        />
      ),
    },
    {
      kind: 'table',
      columns: [
        { label: 'Line' },
        { label: `Estimate${inUnit}`, align: 'right' },
        { label: `${intervalHeading(parameters.confidence)}${inUnit}`, align: 'right' },
        { label: 'Method' },
      ],
      rows: [
        ['Upper limit', upperLimit, result.limitsMethod] as const,
        ['Bias', bias, result.biasMethod] as const,
        ['Lower limit', lowerLimit, result.limitsMethod] as const,
      ].map(([label, line, method]) => {
        const { estimate, interval } = lineTexts(line, decimals)
        return [label, estimate, interval, method]
      }),
    },
    ...result.caveats.map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}

const drawn = ({ estimate, lower, upper }: Line) => ({
  intercept: estimate,
  interval: { lower, upper },
})
