import type { Report } from '#shared/schemas/report.ts'
import { REPORT_STATE_LABELS } from '#shared/terms/reportState.ts'
import { Button } from '../../ui/Button.tsx'
import { Tag, type TagTone } from '../../ui/Tag.tsx'
import { useTryReportAgain } from './reports.api.ts'

const TONES: Record<Report['state'], TagTone> = {
  preparing: 'warn',
  issued: 'good',
  failed: 'stop',
}

type ReportStateCellProps = {
  studyId: string
  report: Report
  mayTryAgain: boolean
}

/** How a report stands: being written, there, or why it could not be written. */
export function ReportStateCell({ studyId, report, mayTryAgain }: ReportStateCellProps) {
  const again = useTryReportAgain(studyId)
  return (
    <div className="flex flex-col items-start gap-2">
      <Tag tone={TONES[report.state]}>{REPORT_STATE_LABELS[report.state]}</Tag>
      {report.failure && <p className="max-w-[32ch] text-sm text-stop">{report.failure}</p>}
      {again.error && <p className="max-w-[32ch] text-sm text-stop">{again.error.message}</p>}
      {report.state === 'failed' && mayTryAgain && (
        <Button
          kind="quiet"
          size="small"
          busy={again.isPending && 'Asking…'}
          onClick={() => again.mutate(report.id)}
        >
          Try again
        </Button>
      )}
    </div>
  )
}
