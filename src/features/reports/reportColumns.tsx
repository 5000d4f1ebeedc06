import type { Report } from '#shared/schemas/report.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import type { TableColumn } from '../../ui/tableColumn.ts'
import { ReportPartCell } from './ReportPartCell.tsx'
import { ReportStateCell } from './ReportStateCell.tsx'

type Reading = {
  studyId: string
  mayIssue: boolean
  mayOpen: { open: boolean; closed: boolean }
}

export const reportColumns = (reading: Reading): TableColumn<Report>[] => [
  {
    id: 'title',
    header: 'Report',
    value: (report) => report.number,
    cell: (report) => (
      <>
        <span className="font-semibold">
          {formatCount(report.number)}. {report.title}
        </span>
        <span className="block text-sm text-ink-2">
          {formatCount(report.analysisCount)} {report.analysisCount === 1 ? 'analysis' : 'analyses'}
          , asked for by {report.issuedByName}
        </span>
        <span className="block text-sm text-ink-2">
          <InstantText at={report.issuedAt} />
        </span>
      </>
    ),
  },
  {
    id: 'state',
    header: 'State',
    value: (report) => report.state,
    cell: (report) => (
      <ReportStateCell studyId={reading.studyId} report={report} mayTryAgain={reading.mayIssue} />
    ),
  },
  {
    id: 'open',
    header: 'Open part',
    value: (report) => report.files.length,
    cell: (report) => <ReportPartCell report={report} part="open" mayOpen={reading.mayOpen.open} />,
  },
  {
    id: 'closed',
    header: 'Closed part',
    value: (report) => report.files.length,
    cell: (report) => (
      <ReportPartCell report={report} part="closed" mayOpen={reading.mayOpen.closed} />
    ),
  },
]
