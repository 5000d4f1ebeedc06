import type { SubgroupTable } from '#shared/schemas/accuracyMore.ts'
import { SUBGROUPING_LABELS } from '#shared/terms/analysis.ts'
import { formatCount, formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import { proportionText } from '#shared/terms/resultText.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** Area by subgroup as a row of intervals on one scale; counts alone where a class has fewer than ten. */
export function SubgroupForest({ table: { by, rows } }: { table: SubgroupTable }) {
  return (
    <section aria-label={`By ${SUBGROUPING_LABELS[by]}`} className="mt-6 border-t border-rule pt-5">
      <h2>By {SUBGROUPING_LABELS[by].toLowerCase()}</h2>
      <StaticTable
        caption={`Accuracy by ${SUBGROUPING_LABELS[by].toLowerCase()}`}
        columns={[
          { header: SUBGROUPING_LABELS[by] },
          { header: 'Present', numeric: true },
          { header: 'Absent', numeric: true },
          { header: 'Area, 0 to 1' },
          { header: 'Area', numeric: true },
          { header: 'Sensitivity', numeric: true },
          { header: 'Specificity', numeric: true },
        ]}
        rows={rows.map(({ subgroup, present, absent, area, sensitivity, specificity }) => ({
          key: subgroup ?? '',
          cells: [
            subgroup ?? 'Not recorded',
            formatCount(present),
            formatCount(absent),
            area ? <Whisker key="whisker" area={area} /> : '',
            area
              ? `${formatEstimate(area.estimate)} (${formatInterval(area.lower, area.upper)})`
              : 'Counts only',
            sensitivity ? proportionText(sensitivity) : '',
            specificity ? proportionText(specificity) : '',
          ],
        }))}
      />
      <p className="mt-3 text-sm text-ink-2">
        With fewer than ten in a class counts alone are given. Whether groups differ takes a
        comparison of their own, not a look at two intervals.
      </p>
    </section>
  )
}

type Area = NonNullable<SubgroupTable['rows'][number]['area']>

/** The same numbers stand beside it in words. */
function Whisker({ area: { estimate, lower, upper } }: { area: Area }) {
  const at = (value: number) => 4 + value * 112
  return (
    <svg viewBox="0 0 120 16" className="h-4 w-[120px]" aria-hidden="true">
      <line x1={at(0)} x2={at(1)} y1="8" y2="8" className="stroke-rule" />
      <line x1={at(0.5)} x2={at(0.5)} y1="2" y2="14" className="stroke-rule-2" />
      {lower !== null && upper !== null && (
        <line
          x1={at(lower)}
          x2={at(upper)}
          y1="8"
          y2="8"
          className="stroke-ink"
          strokeWidth="1.6"
        />
      )}
      <rect x={at(estimate) - 3} y="5" width="6" height="6" className="fill-ink" />
    </svg>
  )
}
