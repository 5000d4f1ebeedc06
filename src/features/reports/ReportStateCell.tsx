import { useQuery } from '@tanstack/react-query'
import type { Report } from '#shared/schemas/report.ts'
import { REPORT_STATE_LABELS } from '#shared/terms/reportState.ts'
import { Button } from '../../ui/Button.tsx'
import { Progress } from '../../ui/Progress.tsx'
import { Tag, type TagTone } from '../../ui/Tag.tsx'
import { reportJobQuery, useStopWriting, useTryReportAgain } from './reports.api.ts'

const TONES: Record<Report['state'], TagTone> = {
  preparing: 'warn',
  issued: 'good',
  failed: 'stop',
}

type ReportStateCellProps = {
  studyId: string
  report: Report
  /** The reader asked for this report and so may see and stop the work on it. */
  own: boolean
  mayTryAgain: boolean
}

/** How a report stands: being written with its progress, there, or why it could not be written. */
export function ReportStateCell({ studyId, report, own, mayTryAgain }: ReportStateCellProps) {
  const again = useTryReportAgain(studyId)
  if (report.state === 'preparing' && own && report.jobId)
    return <Writing studyId={studyId} jobId={report.jobId} />
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

function Writing({ studyId, jobId }: { studyId: string; jobId: string }) {
  const job = useQuery(reportJobQuery(jobId))
  const stop = useStopWriting(studyId)
  const total = job.data?.progressTotal ?? 0
  return (
    <Progress
      label="Being written"
      fraction={total > 0 ? (job.data?.progressDone ?? 0) / total : undefined}
      detail={
        stop.isPending || stop.isSuccess ? 'Stopping' : (job.data?.progressWords ?? 'Waiting')
      }
      onCancel={() => stop.mutate(jobId)}
    />
  )
}
