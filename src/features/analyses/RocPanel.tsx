import { useCallback, useId, useMemo } from 'react'
import { cutOffLabel } from '#shared/analyses/cutOffLabel.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import { rocCurveTable } from '#shared/figures/rocCurveTable.ts'
import type { RocCurveSeries, RocCutOff } from '#shared/figures/rocCurveTypes.ts'
import { formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import type { AccuracyShown } from './accuracyShown.ts'

type RocPanelProps = { shown: AccuracyShown; provenance: readonly string[] }

/** The area under the curve and the curve itself, with the cut-off on it. */
export function RocPanel({ shown, provenance }: RocPanelProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 560, first: 470 })
  const { overall, analyteName, unit } = shown
  const series = useMemo(() => [seriesOf(overall, analyteName, unit)], [overall, analyteName, unit])
  const table = useCallback(() => rocCurveTable({ curves: series }), [series])
  const { area } = overall
  return (
    <section aria-labelledby={`${id}-area`} ref={ref} className="min-w-0">
      <h2 id={`${id}-area`}>
        {area ? (
          <>
            Area under the curve {formatEstimate(area.estimate)}{' '}
            <span className="font-normal text-ink-2">
              ({formatInterval(area.lower, area.upper)})
            </span>
          </>
        ) : (
          'ROC curve'
        )}
      </h2>
      {overall.areaWithheld && <p className="mb-3 text-sm">{overall.areaWithheld}</p>}
      {area?.note && <p className="mb-3 text-sm">{area.note}</p>}
      <div style={{ maxWidth: width }}>
        <RocCurve
          id={`${id}-roc`}
          curves={series}
          cutOff={markOf(shown)}
          width={width}
          theme={theme}
        />
      </div>
      <FigureNumbers
        summary="The curve in numbers"
        table={table}
        provenance={provenance}
        fileName="roc-curve"
      />
    </section>
  )
}

function seriesOf(
  { curve, area }: AccuracyShown['overall'],
  label: string,
  unit: string,
): RocCurveSeries {
  const present = curve.truePositives.at(-1) ?? 0
  const absent = curve.falsePositives.at(-1) ?? 0
  return {
    label,
    unit,
    points: curve.thresholds.map((threshold, at) => ({
      threshold,
      sensitivity: curve.truePositives[at]! / present,
      falsePositiveFraction: curve.falsePositives[at]! / absent,
    })),
    ...(area ? { area } : {}),
  }
}

function markOf({ atCutOff, overall, plannedCutOff, unit }: AccuracyShown): RocCutOff | undefined {
  if (!atCutOff) return undefined
  const { truePositives, falsePositives, falseNegatives, trueNegatives } = atCutOff.table
  return {
    sensitivity: truePositives / (truePositives + falseNegatives),
    falsePositiveFraction: falsePositives / (falsePositives + trueNegatives),
    value: atCutOff.cutOff,
    unit,
    label: cutOffLabel(atCutOff.cutOff, plannedCutOff, overall.rules),
  }
}
