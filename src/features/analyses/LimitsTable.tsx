import { agreementHintWords } from '#shared/analyses/agreementHintWords.ts'
import { limitsTable, lineUnit, replicatesWords } from '#shared/analyses/agreementTables.ts'
import type { AgreementFigures } from '#shared/schemas/agreement.ts'
import { ACCEPTANCE_VERDICT_WORDS, type AcceptanceVerdict } from '#shared/terms/analysis.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { withUnit } from '#shared/terms/resultText.ts'
import { Notice, type NoticeTone } from '../../ui/Notice.tsx'
import { ResultTableView } from './ResultTableView.tsx'

const TONES: Record<AcceptanceVerdict, NoticeTone> = {
  within: 'good',
  notShown: 'warn',
  beyond: 'stop',
}

type LimitsTableProps = { figures: AgreementFigures; unit: string; confidence: number }

/** Bias and limits with their intervals, hints, and how they stand to the acceptance limits. */
export function LimitsTable({ figures, unit, confidence }: LimitsTableProps) {
  const { acceptance, caveats } = figures
  const replicates = replicatesWords(figures, unit)
  const shownIn = lineUnit(figures, unit)
  return (
    <>
      <ResultTableView table={limitsTable(figures, unit, confidence)} />
      <div className="mt-3 space-y-3 text-sm text-ink-2">
        {[...caveats, ...(replicates ? [replicates] : [])].map((sentence) => (
          <p key={sentence} className="text-ink">
            {sentence}
          </p>
        ))}
        {agreementHintWords(figures).map((hint) => (
          <p key={hint}>{hint}</p>
        ))}
        {acceptance ? (
          <Notice
            tone={TONES[acceptance.verdict]}
            title={`Acceptable from ${formatConcentration(acceptance.lower)} to ${withUnit(formatConcentration(acceptance.upper), shownIn)}`}
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
