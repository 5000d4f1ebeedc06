import { useId } from 'react'
import { curvePoints } from '#shared/analyses/curvePoints.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import { rocCurveTable } from '#shared/figures/rocCurveTable.ts'
import type { ComparisonParameters, ComparisonResult } from '#shared/schemas/comparison.ts'
import { comparisonTexts } from '#shared/terms/comparisonText.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatCount, formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import { POSITIVE_RULES } from '#shared/terms/protocol.ts'
import { intervalHeading } from '#shared/terms/resultText.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'

type StoredComparisonProps = {
  result: ComparisonResult
  parameters: ComparisonParameters
  provenance: readonly string[]
}

/** Curves on one axis, their areas, and the differences between them. */
export function StoredComparison({ result, parameters, provenance }: StoredComparisonProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 560, first: 470 })
  const { curves, areaWithheld } = result
  const paired = parameters.compare.design === 'paired'
  const series = curves.map(({ label, unit, curve, area }) => ({
    label,
    unit: unitLabel(unit),
    points: curvePoints(curve),
    ...(area ? { area } : {}),
  }))
  return (
    <>
      <div className="grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <section aria-labelledby={`${id}-curves`} ref={ref} className="min-w-0">
          <h2 id={`${id}-curves`}>{paired ? 'Curves of the same subjects' : 'Two groups'}</h2>
          <div style={{ maxWidth: width }}>
            <RocCurve id={`${id}-roc`} curves={series} width={width} theme={theme} />
          </div>
          <FigureNumbers
            summary="The curves in numbers"
            table={() => rocCurveTable({ curves: series })}
            provenance={provenance}
            fileName="roc-curves"
          />
        </section>
        <section aria-labelledby={`${id}-areas`} className="min-w-0">
          <h2 id={`${id}-areas`}>Areas under the curves</h2>
          {areaWithheld && <p className="mb-3 text-sm">{areaWithheld}</p>}
          <StaticTable
            caption="Areas under the curves"
            columns={[
              { header: paired ? 'Biomarker' : 'Group' },
              { header: 'Present', numeric: true },
              { header: 'Absent', numeric: true },
              { header: 'Area', numeric: true },
              { header: intervalHeading(parameters.confidence), numeric: true },
            ]}
            rows={curves.map(({ label, direction, present, absent, area }) => ({
              key: label,
              cells: [
                <>
                  {label}
                  <span className="block text-sm font-normal text-ink-2">
                    {POSITIVE_RULES[direction]} the cut-off
                  </span>
                </>,
                formatCount(present),
                formatCount(absent),
                area ? formatEstimate(area.estimate) : 'Counts only',
                area ? formatInterval(area.lower, area.upper) : '',
              ],
            }))}
          />
          <p className="mt-3 text-sm text-ink-2">
            {paired
              ? 'Only subjects with an outcome and a valid value of every analyte are counted.'
              : `${result.analyteName} in two groups of different subjects.`}
          </p>
        </section>
      </div>
      {result.comparisons.length > 0 && (
        <Differences result={result} confidence={parameters.confidence} paired={paired} />
      )}
    </>
  )
}

function Differences(props: { result: ComparisonResult; confidence: number; paired: boolean }) {
  const { comparisons, curves } = props.result
  const labels = curves.map((each) => each.label)
  const isAdjusted = comparisons.some((each) => each.pAdjusted !== null)
  const permutation = comparisons.find((each) => each.permutation)?.permutation
  return (
    <section aria-label="Differences of areas" className="mt-6 border-t border-rule pt-5">
      <h2>Differences of areas</h2>
      <StaticTable
        caption="Differences of areas"
        columns={[
          { header: 'Areas' },
          { header: 'Difference', numeric: true },
          { header: intervalHeading(props.confidence), numeric: true },
          { header: 'Test', numeric: true },
          { header: 'p', numeric: true },
          ...(isAdjusted ? [{ header: 'p, Holm', numeric: true }] : []),
          ...(permutation ? [{ header: 'p, permutation', numeric: true }] : []),
        ]}
        rows={comparisons.map((each) => {
          const texts = comparisonTexts(each, labels)
          return {
            key: texts.pair,
            cells: [
              <>
                {texts.pair}
                {each.difference.note && (
                  <span className="block text-sm font-normal text-ink-2">
                    {each.difference.note}
                  </span>
                )}
              </>,
              texts.difference,
              texts.interval,
              texts.test,
              texts.p,
              ...(isAdjusted ? [texts.adjusted] : []),
              ...(permutation ? [texts.permutation] : []),
            ],
          }
        })}
      />
      <p className="mt-3 text-sm text-ink-2">
        {props.paired
          ? 'Paired comparison of areas (DeLong, DeLong & Clarke-Pearson 1988).'
          : 'Independent comparison: DeLong variances, t with Welch–Satterthwaite degrees of freedom.'}
        {isAdjusted && ' Adjusted for several comparisons after Holm (1979).'}
        {permutation &&
          ` The permutation test is of the whole curves (Venkatraman & Begg 1996): ${formatCount(permutation.permutations)} permutations, seed ${permutation.seed}.`}
      </p>
    </section>
  )
}
