import type { AccuracyAtCutOffResult, MeasureRow } from '#shared/schemas/analysis.ts'
import { type Measure, measureLabel } from '#shared/terms/analysis.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { intervalHeading, measureTexts } from '#shared/terms/resultText.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'

type MeasureTableProps = {
  atCutOff: AccuracyAtCutOffResult
  confidence: number
  prevalence: number | null
}

/** The two-by-two table at a cut-off, and what it tells with its intervals. */
export function MeasureTable({ atCutOff, confidence, prevalence }: MeasureTableProps) {
  const { table, measures, caveat, observedPredictiveValuesHidden } = atCutOff
  return (
    <>
      <StaticTable
        caption="Sensor against reference outcome at the cut-off"
        columns={[
          { header: 'Sensor' },
          { header: 'Present', numeric: true },
          { header: 'Absent', numeric: true },
        ]}
        rows={[
          row('Positive', table.truePositives, table.falsePositives),
          row('Negative', table.falseNegatives, table.trueNegatives),
        ]}
      />
      <StaticTable
        caption="Accuracy at the cut-off"
        columns={[
          { header: 'Measure' },
          { header: 'n/N', numeric: true },
          { header: 'Estimate', numeric: true },
          { header: intervalHeading(confidence), numeric: true },
        ]}
        rows={measures.map((each) => {
          const { fraction, estimate, interval } = measureTexts(each)
          const name = <MeasureName key="name" row={each} prevalence={prevalence} />
          return { key: each.measure, cells: [name, fraction, estimate, interval] }
        })}
      />
      <div className="mt-3 space-y-2 text-sm text-ink-2">
        {caveat && <p className="text-ink">{caveat}</p>}
        {observedPredictiveValuesHidden && <p>{observedPredictiveValuesHidden}</p>}
        {!caveat && <p>Intervals: {methodsOf(measures, prevalence)}.</p>}
      </div>
    </>
  )
}

const row = (name: string, present: number, absent: number) => ({
  key: name,
  cells: [name, formatCount(present), formatCount(absent)],
})

function MeasureName({ row, prevalence }: { row: MeasureRow; prevalence: number | null }) {
  return (
    <>
      {measureLabel(row.measure, prevalence)}
      {row.note && <span className="block text-sm text-ink-2">{row.note}</span>}
    </>
  )
}

/** "Wilson for proportions; log method (Simel) for likelihood ratios; …". */
function methodsOf(measures: readonly MeasureRow[], prevalence: number | null): string {
  const groups: [string, (measure: Measure) => boolean][] = [
    [
      'proportions',
      (measure) => ['sensitivity', 'specificity'].includes(measure) || measure.endsWith('Observed'),
    ],
    ['likelihood ratios', (measure) => measure.startsWith('likelihoodRatio')],
    ['the odds ratio', (measure) => measure === 'diagnosticOddsRatio'],
  ]
  if (prevalence !== null)
    groups.push([
      'predictive values at the stated prevalence',
      (measure) => measure.endsWith('AtPrevalence'),
    ])
  return groups
    .flatMap(([words, belongs]) => {
      const method = measures.find((each) => belongs(each.measure))?.method
      return method ? [`${method} for ${words}`] : []
    })
    .join('; ')
}
