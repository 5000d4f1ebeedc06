import { type ReactNode, useMemo } from 'react'
import { valueAxis } from '#shared/figures/valueAxis.ts'
import { CHOSEN_FROM_DATA } from '#shared/terms/analysis.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { POSITIVE_RULES } from '#shared/terms/protocol.ts'
import { Tag } from '../../ui/Tag.tsx'
import type { AccuracyShown } from './accuracyShown.ts'
import { CutOffControl } from './CutOffControl.tsx'
import { cutOffChoices } from './cutOffChoices.ts'
import { MeasureTable } from './MeasureTable.tsx'
import { RocPanel } from './RocPanel.tsx'
import { StripPanel } from './StripPanel.tsx'

type AccuracyPanelsProps = {
  shown: AccuracyShown
  /** Values by outcome; absent while they load. */
  values: { present: readonly number[]; absent: readonly number[] } | undefined
  provenance: readonly string[]
  /** Given while exploring: the cut-off can be moved. */
  onCutOff?: (cutOff: number) => void
  /** More settings under the table at the cut-off. */
  children?: ReactNode
}

/** Curve, table at the cut-off and strip of values: one cut-off through all three. */
export function AccuracyPanels(props: AccuracyPanelsProps) {
  const { shown, values, provenance, onCutOff, children } = props
  const { atCutOff, plannedCutOff, overall, unit } = shown
  const axis = useMemo(
    () =>
      values &&
      valueAxis([
        ...values.present,
        ...values.absent,
        ...(plannedCutOff === null ? [] : [plannedCutOff]),
      ]),
    [values, plannedCutOff],
  )
  return (
    <>
      <div className="grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <RocPanel shown={shown} provenance={provenance} />
        <section aria-label="At the cut-off" className="min-w-0">
          <h2>At the cut-off</h2>
          {onCutOff && axis && atCutOff ? (
            <CutOffControl
              cutOff={atCutOff.cutOff}
              onChange={onCutOff}
              plannedCutOff={plannedCutOff}
              rules={overall.rules}
              unit={unit}
              label={shown.analyteName}
              hint={POSITIVE_RULES[shown.direction]}
              axis={axis}
            />
          ) : (
            <StoredCutOff shown={shown} />
          )}
          {atCutOff && (
            <MeasureTable
              atCutOff={atCutOff}
              confidence={shown.confidence}
              prevalence={shown.prevalence}
            />
          )}
          {children}
        </section>
      </div>
      {values && axis && (
        <StripPanel shown={shown} values={values} axis={axis} provenance={provenance} />
      )}
    </>
  )
}

/** The cut-off of a stored analysis, and what else there was to choose. */
function StoredCutOff({ shown }: { shown: AccuracyShown }) {
  const { atCutOff, plannedCutOff, overall, unit, direction } = shown
  const choices = cutOffChoices(overall.rules)
  return (
    <div className="mb-3.5">
      <p className="font-semibold">{shown.analyteName}</p>
      <p className="text-ink-2">
        {atCutOff ? (
          <>
            {POSITIVE_RULES[direction]}{' '}
            <strong className="font-semibold text-copper">
              {formatConcentration(atCutOff.cutOff)} {unit}
            </strong>
          </>
        ) : (
          'Stored without a cut-off.'
        )}
      </p>
      <div className="mt-2.5 flex flex-wrap items-center gap-2">
        {plannedCutOff !== null && (
          <Tag tone="copper">Planned {formatConcentration(plannedCutOff)}</Tag>
        )}
        {choices.length > 0 && (
          <>
            <span className="text-sm text-ink-2">{CHOSEN_FROM_DATA}:</span>
            {choices.map((choice) => (
              <Tag key={choice.key}>{choice.text}</Tag>
            ))}
          </>
        )}
      </div>
    </div>
  )
}
