import type { TroubledResults } from '#shared/schemas/accuracyMore.ts'
import { SCENARIO_LABELS } from '#shared/terms/analysis.ts'
import { proportionText, troubledNote } from '#shared/terms/resultText.ts'
import { Facts } from '../../ui/Facts.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'

/** Results in doubt counted either way, and subjects without a result. */
export function TroubledTable({ troubled, unit }: { troubled: TroubledResults; unit: string }) {
  const { index, reference } = troubled
  const table = (caption: string, scenarios: TroubledResults['index']['scenarios']) => (
    <StaticTable
      caption={caption}
      hideCaption={false}
      columns={[
        { header: 'Results in doubt' },
        { header: 'Sensitivity', numeric: true },
        { header: 'Specificity', numeric: true },
      ]}
      rows={scenarios.map(({ key, sensitivity, specificity }) => ({
        key,
        cells: [SCENARIO_LABELS[key], proportionText(sensitivity), proportionText(specificity)],
      }))}
    />
  )
  return (
    <section aria-label="Results in doubt" className="mt-6 border-t border-rule pt-5">
      <h2>Results in doubt, and results that are not there</h2>
      <p className="mb-3 text-sm">{troubledNote(troubled, unit)}</p>
      {troubled.zone && table('Indeterminate sensor results', index.scenarios)}
      {reference.indexPositive + reference.indexNegative > 0 &&
        table('Indeterminate reference outcomes', reference.scenarios)}
      <div className="mt-4">
        <Facts
          layout="rows"
          items={[
            {
              term: 'Subjects with a determinate result',
              value: proportionText(index.determinate),
            },
            { term: 'Subjects with a valid result', value: proportionText(index.valid) },
          ]}
        />
      </div>
    </section>
  )
}
