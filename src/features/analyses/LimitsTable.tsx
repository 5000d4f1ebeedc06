import type { AgreementFigures } from '#shared/schemas/analysis.ts'
import { ACCEPTANCE_VERDICT_WORDS, type AcceptanceVerdict } from '#shared/terms/analysis.ts'
import { formatConcentration, formatEstimate } from '#shared/terms/numbers.ts'
import { agreementDecimals, intervalHeading, lineTexts } from '#shared/terms/resultText.ts'
import { Notice, type NoticeTone } from '../../ui/Notice.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'

const TONES: Record<AcceptanceVerdict, NoticeTone> = {
  within: 'good',
  notShown: 'warn',
  beyond: 'stop',
}

type LimitsTableProps = { figures: AgreementFigures; unit: string; confidence: number }

/** Bias and limits with their intervals, and how they stand to the acceptance limits. */
export function LimitsTable({ figures, unit, confidence }: LimitsTableProps) {
  const { bias, lowerLimit, upperLimit, sd, acceptance, caveats } = figures
  const decimals = agreementDecimals(sd)
  const row = (name: string, line: typeof bias) => {
    const { estimate, interval } = lineTexts(line, decimals)
    return { key: name, cells: [name, estimate, interval] }
  }
  return (
    <>
      <StaticTable
        caption="Bias and limits of agreement"
        columns={[
          { header: `Sensor − reference${unit ? ` (${unit})` : ''}` },
          { header: 'Estimate', numeric: true },
          { header: intervalHeading(confidence), numeric: true },
        ]}
        rows={[
          row('Upper limit', upperLimit),
          row('Bias', bias),
          row('Lower limit', lowerLimit),
          {
            key: 'sd',
            cells: ['SD of the differences', formatEstimate(sd, decimals), ''],
          },
        ]}
      />
      <div className="mt-3 space-y-3 text-sm text-ink-2">
        <p>
          95 % of differences are expected between the limits. Intervals: {figures.limitsMethod} for
          the limits; {figures.biasMethod} for the bias.
        </p>
        {caveats.map((caveat) => (
          <p key={caveat} className="text-ink">
            {caveat}
          </p>
        ))}
        {acceptance ? (
          <Notice
            tone={TONES[acceptance.verdict]}
            title={`Acceptable from ${formatConcentration(acceptance.lower)} to ${formatConcentration(acceptance.upper)} ${unit}`}
          >
            {ACCEPTANCE_VERDICT_WORDS[acceptance.verdict]}
          </Notice>
        ) : (
          <p>No acceptance limits were set, so nothing is judged.</p>
        )}
      </div>
    </>
  )
}
