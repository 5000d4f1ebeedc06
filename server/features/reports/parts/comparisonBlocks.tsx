import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { curvePoints } from '#shared/analyses/curvePoints.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import type { ComparisonResult } from '#shared/schemas/comparison.ts'
import { comparisonTexts } from '#shared/terms/comparisonText.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatCount, formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import { DIRECTION_LABELS } from '#shared/terms/protocol.ts'
import { intervalHeading } from '#shared/terms/resultText.ts'
import type { StoredAnalysis } from '../reportSource.ts'

/** Curves on one axis, their areas, and the differences between them. */
export function comparisonBlocks(
  { number, parameters }: StoredAnalysis,
  result: ComparisonResult,
): ReportBlock[] {
  if (parameters.kind !== 'comparison') throw new Error('The parameters are of another kind.')
  const { curves, comparisons, areaWithheld } = result
  const heading = intervalHeading(parameters.confidence)
  const labels = curves.map((each) => each.label)
  const paired = parameters.compare.design === 'paired'
  return [
    {
      kind: 'paragraph',
      text: paired
        ? 'All curves are of the same subjects: those with an outcome and a valid value of every analyte.'
        : `Two groups of different subjects, ${result.analyteName}.`,
    },
    ...(areaWithheld ? [{ kind: 'paragraph' as const, text: areaWithheld }] : []),
    {
      kind: 'figure',
      share: 0.62,
      caption: `Sensitivity against 1 − specificity: ${labels.join(', ')}.`,
      figure: (
        <RocCurve
          id={`analysis-${number}-roc`}
          curves={curves.map(({ label, unit, curve, area }) => ({
            label,
            unit: unitLabel(unit),
            points: curvePoints(curve),
            ...(area ? { area } : {}),
          }))}
        />
      ),
    },
    {
      kind: 'table',
      caption: 'Areas under the curves',
      columns: [
        { label: paired ? 'Biomarker' : 'Group' },
        { label: 'Direction' },
        { label: 'Present', align: 'right' },
        { label: 'Absent', align: 'right' },
        { label: 'Area', align: 'right' },
        { label: heading, align: 'right' },
      ],
      rows: curves.map(({ label, direction, present, absent, area }) => [
        label,
        DIRECTION_LABELS[direction],
        formatCount(present),
        formatCount(absent),
        area ? formatEstimate(area.estimate) : 'counts only',
        area ? formatInterval(area.lower, area.upper) : '',
      ]),
    },
    ...(comparisons.length > 0 ? [differences(result, labels, heading)] : []),
    ...notesOf(result, paired).map((text) => ({ kind: 'paragraph' as const, text, quiet: true })),
  ]
}

function differences(
  { comparisons }: ComparisonResult,
  labels: readonly string[],
  heading: string,
): ReportBlock {
  const isAdjusted = comparisons.some((each) => each.pAdjusted !== null)
  const isPermuted = comparisons.some((each) => each.permutation)
  return {
    kind: 'table',
    caption: 'Differences of areas',
    columns: [
      { label: 'Areas' },
      { label: 'Difference', align: 'right' },
      { label: heading, align: 'right' },
      { label: 'Test', align: 'right' },
      { label: 'p', align: 'right' },
      ...(isAdjusted ? [{ label: 'p, Holm', align: 'right' as const }] : []),
      ...(isPermuted ? [{ label: 'p, permutation', align: 'right' as const }] : []),
    ],
    rows: comparisons.map((each) => {
      const { pair, difference, interval, test, p, adjusted, permutation } = comparisonTexts(
        each,
        labels,
      )
      return [
        pair,
        difference,
        interval,
        test,
        p,
        ...(isAdjusted ? [adjusted] : []),
        ...(isPermuted ? [permutation] : []),
      ]
    }),
  }
}

function notesOf({ comparisons }: ComparisonResult, paired: boolean): string[] {
  const permutation = comparisons.find((each) => each.permutation)?.permutation
  return [
    paired
      ? 'Paired comparison: DeLong, DeLong & Clarke-Pearson 1988.'
      : 'Independent comparison: DeLong variances, t with Welch–Satterthwaite degrees of freedom.',
    ...(comparisons.some((each) => each.pAdjusted !== null)
      ? ['p adjusted for several comparisons: Holm 1979, Scand J Stat 6:65.']
      : []),
    ...(permutation
      ? [
          `Permutation test of the whole curves: Venkatraman & Begg 1996, Biometrika 83:835; ${formatCount(permutation.permutations)} permutations, seed ${permutation.seed}.`,
        ]
      : []),
    ...new Set(comparisons.flatMap(({ difference }) => difference.note ?? [])),
  ]
}
