import type { DataImport } from '#shared/schemas/import.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { ErrorNotice } from '../../ui/ErrorNotice.tsx'
import { Progress } from '../../ui/Progress.tsx'
import { useStopWork } from './imports.api.ts'

/** Long work under way: how far it is, and the way to stop it. */
export function ImportWork({ studyId, of }: { studyId: string; of: DataImport }) {
  const stop = useStopWork(studyId, of.id)
  const { work } = of
  if (!work) return null
  const entering = of.state === 'entering'
  const counted = work.total > 0 && work.done < work.total
  return (
    <div className="flex max-w-3xl flex-col gap-4 py-4">
      <Progress
        label={entering ? 'The rows are being entered' : 'The file is being checked'}
        fraction={counted ? work.done / work.total : undefined}
        detail={
          <span role="status">
            {work.stopping ? 'Stopping' : work.words}
            {counted && !work.stopping && entering
              ? `: ${formatCount(work.done)} of ${formatCount(work.total)}`
              : ''}
          </span>
        }
        onCancel={work.own && !work.stopping ? () => stop.mutate(work.jobId) : undefined}
        cancelLabel={entering ? 'Stop entering' : 'Stop checking'}
      />
      {stop.error && <ErrorNotice what="It could not be stopped" error={stop.error} />}
      <p className="text-ink-2">
        {entering
          ? 'All rows enter in one step: until the end nothing of them is in the study, and if you stop, nothing will be.'
          : 'Nothing is written to the study.'}{' '}
        You may leave this page; the work goes on.
      </p>
    </div>
  )
}
