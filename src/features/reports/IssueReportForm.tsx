import { useState } from 'react'
import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import type { DatasetSummary } from '#shared/schemas/dataset.ts'
import { reportRequest } from '#shared/schemas/report.ts'
import { LOCK_KIND_LABELS } from '#shared/terms/lockState.ts'
import { formatCount, formatInstant } from '#shared/terms/numbers.ts'
import { Form } from '../../forms/Form.tsx'
import { SelectField } from '../../forms/SelectField.tsx'
import { TextField } from '../../forms/TextField.tsx'
import { AnalysisChoiceField } from './AnalysisChoiceField.tsx'
import { useIssueReport } from './reports.api.ts'

type IssueReportFormProps = {
  studyId: string
  /** The newest first. */
  datasets: readonly DatasetSummary[]
  analyses: readonly AnalysisSummary[]
  onAsked: () => void
  onCancel: () => void
}

/** Title, dataset and the stored analyses that the report shows. */
export function IssueReportForm(props: IssueReportFormProps) {
  const issue = useIssueReport(props.studyId)
  const [defaults] = useState(() => ({
    id: crypto.randomUUID() as string,
    title: '',
    datasetId: props.datasets[0]?.id ?? '',
    analysisIds: [] as string[],
  }))
  return (
    <Form
      schema={reportRequest}
      defaultValues={defaults}
      submitLabel="Issue the report"
      busyLabel="Asking…"
      onSubmit={(values) => issue.mutateAsync(values)}
      onSaved={props.onAsked}
      onCancel={props.onCancel}
    >
      <TextField
        name="title"
        label="Title"
        hint="Stands on both parts, and everybody in the study reads the open one: no results in it."
      />
      <SelectField
        name="datasetId"
        label="Dataset"
        options={props.datasets.map((dataset) => ({
          value: dataset.id,
          label: `${LOCK_KIND_LABELS[dataset.lockKind]} ${dataset.lockNumber}, ${formatInstant(dataset.frozenAt)}, ${formatCount(dataset.subjectCount)} subjects`,
        }))}
      />
      <AnalysisChoiceField analyses={props.analyses} />
    </Form>
  )
}
