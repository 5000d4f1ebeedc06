import type { AnalysisRun } from '#shared/schemas/analysis.ts'
import { InstantText } from '../../ui/InstantText.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Progress } from '../../ui/Progress.tsx'
import { isUnderWay, useStopRun } from './analyses.api.ts'

type RunStatusProps = { studyId: string; run: AnalysisRun }

/** How far an analysis is that takes a while, or why it ended without a result. */
export function RunStatus({ studyId, run }: RunStatusProps) {
  const stop = useStopRun(studyId)
  const name = run.title ?? 'An analysis'
  if (!isUnderWay(run))
    return (
      <Notice
        tone={run.state === 'failed' ? 'warn' : 'plain'}
        title={run.state === 'failed' ? 'An analysis was not computed' : 'An analysis was stopped'}
      >
        <p>{run.failure}</p>
        <p className="text-sm text-ink-2">
          Asked for <InstantText at={run.askedAt} /> by {run.askedByName}. Nothing was stored.
        </p>
      </Notice>
    )
  const stopping = stop.isPending || stop.isSuccess
  const canStop = run.own && !stopping
  return (
    <Progress
      label={`${name} is being computed`}
      {...(run.progressTotal > 0 ? { fraction: run.progressDone / run.progressTotal } : {})}
      detail={stop.error ? stop.error.message : stopping ? 'Stopping' : run.progressWords}
      {...(canStop ? { onCancel: () => stop.mutate(run.jobId) } : {})}
    />
  )
}
