import { useCallback, useId } from 'react'
import { cutOffLabel } from '#shared/analyses/cutOffLabel.ts'
import { OutcomeStrip } from '#shared/figures/OutcomeStrip.tsx'
import { outcomeStripTable } from '#shared/figures/outcomeStripTable.ts'
import type { ValueAxis } from '#shared/figures/valueAxis.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import type { AccuracyShown } from './accuracyShown.ts'

type StripPanelProps = {
  shown: AccuracyShown
  values: { present: readonly number[]; absent: readonly number[] }
  /** Shared with the slider. */
  axis: ValueAxis
  provenance: readonly string[]
}

/** Where the values lie: one strip for each reference outcome, with the cut-off across both. */
export function StripPanel({ shown, values, axis, provenance }: StripPanelProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLElement>({ least: 280, most: 1200, first: 1000 })
  const { atCutOff, analyteName: label, unit, direction, plannedCutOff, overall } = shown
  const { present, absent } = values
  const cutOff = atCutOff?.cutOff
  const table = useCallback(
    () =>
      outcomeStripTable({
        label,
        unit,
        present,
        absent,
        ...(cutOff === undefined ? {} : { cutOff: { value: cutOff, direction } }),
      }),
    [label, unit, present, absent, cutOff, direction],
  )
  return (
    <section aria-labelledby={`${id}-values`} ref={ref} className="mt-7 min-w-0">
      <h2 id={`${id}-values`}>Where the values lie</h2>
      <OutcomeStrip
        id={`${id}-strip`}
        label={label}
        unit={unit}
        present={present}
        absent={absent}
        axis={axis}
        width={width}
        theme={theme}
        {...(cutOff === undefined
          ? {}
          : {
              cutOff: { value: cutOff, label: cutOffLabel(cutOff, plannedCutOff, overall.rules) },
            })}
      />
      <FigureNumbers
        summary="The values in numbers"
        table={table}
        provenance={provenance}
        fileName="values-by-outcome"
      />
    </section>
  )
}
