import type { ReactNode } from 'react'
import type { CutOffCorrections } from '#shared/schemas/accuracyMore.ts'
import type { RuleCutOffs } from '#shared/schemas/analysis.ts'
import {
  ANALYSIS_BADGE_LABELS,
  CUT_OFF_RULE_LABELS,
  NOT_CORRECTED,
} from '#shared/terms/analysis.ts'
import { formatConcentration, formatEstimate } from '#shared/terms/numbers.ts'
import { correctionNote, withUnit } from '#shared/terms/resultText.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { Tag } from '../../ui/Tag.tsx'

type ChosenCutOffsProps = {
  rules: readonly RuleCutOffs[]
  /** Absent while nothing was drawn. */
  corrections: CutOffCorrections | undefined
  unit: string
  /** The way to have them corrected, or how far that is. */
  children?: ReactNode
}

/** Each cut-off that a rule chose from the data, as it looks there and as it may do elsewhere. */
export function ChosenCutOffs({ rules, corrections, unit, children }: ChosenCutOffsProps) {
  if (rules.length === 0) return null
  return (
    <section
      aria-label="Cut-offs chosen from these data"
      className="mt-6 border-t border-rule pt-5"
    >
      <h2>
        Cut-offs chosen from these data <Tag>{ANALYSIS_BADGE_LABELS.exploratory}</Tag>
      </h2>
      <StaticTable
        caption="Cut-offs chosen from these data"
        columns={[
          { header: 'Chosen by' },
          { header: 'Cut-off', numeric: true },
          { header: 'Sensitivity', numeric: true },
          { header: 'Specificity', numeric: true },
        ]}
        rows={rules.map(({ rule, cutOffs: [preferred] }) => {
          const found = corrections?.rules.find((each) => each.rule === rule)
          const { threshold, sensitivity, specificity } = found
            ? { threshold: found.threshold, ...found.apparent }
            : preferred!
          return {
            key: rule,
            cells: [
              CUT_OFF_RULE_LABELS[rule],
              threshold === null
                ? 'nobody positive'
                : withUnit(formatConcentration(threshold), unit),
              <Rate
                key="sensitivity"
                here={sensitivity}
                corrected={found?.corrected.sensitivity}
              />,
              <Rate
                key="specificity"
                here={specificity}
                corrected={found?.corrected.specificity}
              />,
            ],
          }
        })}
      />
      <p className="mt-3 text-sm text-ink-2">
        {corrections ? correctionNote(corrections) : NOT_CORRECTED}
      </p>
      {children}
    </section>
  )
}

/** As on these data and, under it, as to be expected elsewhere: on a phone too, never one without the other. */
function Rate({ here, corrected }: { here: number; corrected: number | undefined }) {
  return (
    <>
      {formatEstimate(here)}
      <span className="block text-sm">
        {corrected === undefined ? (
          <span className="text-ink-2">not corrected</span>
        ) : (
          <>
            <span className="text-ink-2">corrected</span>{' '}
            <strong>{formatEstimate(corrected)}</strong>
          </>
        )}
      </span>
    </>
  )
}
