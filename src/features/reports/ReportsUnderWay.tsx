import { useQuery } from '@tanstack/react-query'
import type { Report } from '#shared/schemas/report.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Progress } from '../../ui/Progress.tsx'
import { reportJobQuery, useStopWriting } from './reports.api.ts'

type ReportsUnderWayProps = {
  studyId: string
  reports: readonly Report[]
  /** Whoever asked for a report sees how far it is and may stop it. */
  readerId: string | undefined
}

/** How far the reader's own reports are that are being written. */
export function ReportsUnderWay({ studyId, reports, readerId }: ReportsUnderWayProps) {
  const own = reports.filter((report) => report.jobId && report.issuedById === readerId)
  if (own.length === 0) return null
  return (
    <div className="mb-5 flex flex-col gap-4 border-b border-rule pb-5">
      {own.map((report) => (
        <UnderWay key={report.id} studyId={studyId} number={report.number} jobId={report.jobId!} />
      ))}
    </div>
  )
}

function UnderWay({ studyId, number, jobId }: { studyId: string; number: number; jobId: string }) {
  const job = useQuery(reportJobQuery(jobId))
  const stop = useStopWriting(studyId)
  const { progressDone = 0, progressTotal = 0, progressWords = null } = job.data ?? {}
  const stopping = stop.isPending || stop.isSuccess
  return (
    <Progress
      label={`Report ${formatCount(number)} is being written`}
      fraction={progressTotal > 0 ? progressDone / progressTotal : undefined}
      detail={
        stop.error ? stop.error.message : stopping ? 'Stopping' : (progressWords ?? 'Waiting')
      }
      onCancel={stopping ? undefined : () => stop.mutate(jobId)}
    />
  )
}
