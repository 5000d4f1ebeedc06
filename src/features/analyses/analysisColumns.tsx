import { Link } from 'react-router-dom'
import type { AnalysisSummary } from '#shared/schemas/analysis.ts'
import { ANALYSIS_BADGE_LABELS, ANALYSIS_KIND_LABELS } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { formatConcentration, formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
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

/** "Area 0.731 (0.630 to 0.833)", "Bias −2.12 ppb (−22 to 17.8)". */
export function headlineWords({ kind, headline }: AnalysisSummary): string {
  if (kind === 'accuracy') {
    if (!headline) return 'Counts only'
    return `Area ${formatEstimate(headline.estimate)} (${formatInterval(headline.lower, headline.upper)})`
  }
  if (!headline) return ''
  const { estimate, lower, upper, unit } = headline
  const bounds = [lower, upper].map((bound) => formatConcentration(bound ?? Number.NaN, 3))
  return `Bias ${formatConcentration(estimate, 3)} ${unitLabel(unit ?? '1')} (${bounds.join(' to ')})`
}
