import { Link } from 'react-router-dom'
import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import { ANALYSIS_BADGE_LABELS, ANALYSIS_KIND_LABELS } from '#shared/terms/analysis.ts'
import { headlineTexts } from '#shared/terms/resultText.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'

export const analysisColumns: TableColumn<AnalysisSummary>[] = [
  {
    id: 'number',
    header: 'No.',
    value: (analysis) => analysis.number,
    numeric: true,
    sortable: true,
  },
  {
    id: 'title',
    header: 'Analysis',
    value: (analysis) => analysis.title,
    cell: (analysis) => (
      <Link to={analysis.id} className="link font-semibold">
        {analysis.title}
      </Link>
    ),
    sortable: true,
  },
  {
    id: 'kind',
    header: 'Kind',
    value: (analysis) => ANALYSIS_KIND_LABELS[analysis.kind],
    sortable: true,
  },
  {
    id: 'headline',
    header: 'Figure',
    value: headlineWords,
    cell: (analysis) => <span className="wide:whitespace-nowrap">{headlineWords(analysis)}</span>,
  },
  {
    id: 'badge',
    header: 'Standing',
    value: (analysis) => ANALYSIS_BADGE_LABELS[analysis.badge],
    cell: (analysis) => <Tag>{ANALYSIS_BADGE_LABELS[analysis.badge]}</Tag>,
  },
  {
    id: 'runAt',
    header: 'Run',
    value: (analysis) => analysis.runAt,
    cell: (analysis) => (
      <>
        <InstantText at={analysis.runAt} /> by {analysis.runByName}
      </>
    ),
    sortable: true,
  },
]

/** "Area 0.731 (0.630 to 0.833)". */
export function headlineWords({ headline }: Pick<AnalysisSummary, 'headline'>): string {
  const { figure, interval } = headlineTexts(headline)
  return interval ? `${figure} (${interval})` : figure
}
