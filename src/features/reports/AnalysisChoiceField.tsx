import { useMemo } from 'react'
import { useFormContext, useWatch } from 'react-hook-form'
import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import { ANALYSIS_BADGE_LABELS, ANALYSIS_KIND_LABELS } from '#shared/terms/analysis.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { FieldFrame } from '../../forms/FieldFrame.tsx'
import { DataTable } from '../../ui/DataTable.tsx'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

const nameOf = (analysis: AnalysisSummary) => `${analysis.number}. ${analysis.title}`

const columns: TableColumn<AnalysisSummary>[] = [
  { id: 'title', header: 'Analysis', value: nameOf },
  { id: 'kind', header: 'Kind', value: (analysis) => ANALYSIS_KIND_LABELS[analysis.kind] },
  {
    id: 'badge',
    header: 'Standing',
    value: (analysis) => analysis.badge,
    cell: (analysis) => (
      <Tag tone={analysis.badge === 'exploratory' ? 'plain' : 'copper'}>
        {ANALYSIS_BADGE_LABELS[analysis.badge]}
      </Tag>
    ),
  },
  {
    id: 'runAt',
    header: 'Run',
    value: (analysis) => analysis.runAt,
    cell: (analysis) => (
      <>
        <InstantText at={analysis.runAt} />
        <span className="block text-sm text-ink-2">{analysis.runByName}</span>
      </>
    ),
  },
]

type AnalysisChoiceFieldProps = { analyses: readonly AnalysisSummary[] }

/** Which stored analyses of the chosen dataset the closed part shows. */
export function AnalysisChoiceField({ analyses }: AnalysisChoiceFieldProps) {
  const { setValue, formState } = useFormContext()
  const datasetId: string | undefined = useWatch({ name: 'datasetId' })
  const chosen: string[] = useWatch({ name: 'analysisIds' })
  const rows = useMemo(
    () => analyses.filter((analysis) => analysis.datasetId === datasetId),
    [analyses, datasetId],
  )
  const selected = useMemo(
    () => new Set(chosen.filter((id) => rows.some((row) => row.id === id))),
    [chosen, rows],
  )
  return (
    <FieldFrame
      group
      name="analysisIds"
      label="Stored analyses"
      hint={`The report says how many were run: ${formatCount(selected.size)} of ${formatCount(rows.length)} would be shown.`}
    >
      {() => (
        <DataTable
          caption="Stored analyses of the dataset"
          hideCaption
          columns={columns}
          rows={rows}
          rowId={(analysis) => analysis.id}
          selection={{
            selected,
            nameOf,
            onChange: (next) =>
              setValue('analysisIds', [...next], {
                shouldDirty: true,
                shouldValidate: formState.isSubmitted,
              }),
          }}
          empty={
            <EmptyPlace title="No analysis is stored yet">
              {datasetId ? 'Run one on this dataset first.' : 'Choose the dataset first.'}
            </EmptyPlace>
          }
        />
      )}
    </FieldFrame>
  )
}
