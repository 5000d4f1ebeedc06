import type { importRows } from '#db/schema/importRows.ts'
import type { imports } from '#db/schema/imports.ts'
import type { jobs } from '#db/schema/jobs.ts'
import type { DataImport, ImportRow, ImportSummary } from '#shared/schemas/import.ts'
import type { ImportState } from '#shared/terms/importState.ts'
import type { ImportWithJob } from './imports.reads.ts'

type Standing = {
  import: Pick<typeof imports.$inferSelect, 'state'>
  job: Pick<typeof jobs.$inferSelect, 'state' | 'kind'> | null
}

/** The state as a person sees it: what is stored, and the job under way or last ended. */
export function stateOf({ import: { state }, job }: Standing): ImportState {
  if (state !== 'uploaded' && state !== 'previewed') return state
  if (isUnderWay(job)) return job?.kind === 'import.enter' ? 'entering' : 'previewing'
  return state === 'uploaded' && job?.state === 'failed' ? 'failed' : state
}

export const isUnderWay = (job: Standing['job']): boolean =>
  job?.state === 'queued' || job?.state === 'running'

/** An import as it goes out to one person. */
export function toImport(
  row: ImportWithJob,
  sameFile: ImportWithJob | undefined,
  personId: string,
): DataImport {
  const { import: stored, job, uploadedByName } = row
  const state = stateOf(row)
  const working = state === 'previewing' || state === 'entering'
  return {
    ...stored,
    state,
    stopped: job?.state === 'cancelled' && state !== 'entered' && state !== 'discarded',
    failure:
      !working && state !== 'entered' && state !== 'discarded' ? (job?.failure ?? null) : null,
    columns: stored.columns ?? [],
    work:
      working && job
        ? {
            jobId: job.id,
            done: job.progressDone,
            total: job.progressTotal,
            words: job.progressWords,
            own: job.startedBy === personId,
            stopping: job.cancelRequested,
          }
        : null,
    uploadedByName: uploadedByName ?? '',
    createdAt: stored.createdAt.toISOString(),
    enteredAt: stored.enteredAt?.toISOString() ?? null,
    sameFile: sameFile
      ? { id: sameFile.import.id, number: sameFile.import.number, state: stateOf(sameFile) }
      : null,
  }
}

/** A line of the list. */
export const toSummary = (row: ImportWithJob): ImportSummary => ({
  ...row.import,
  state: stateOf(row),
  uploadedByName: row.uploadedByName ?? '',
  createdAt: row.import.createdAt.toISOString(),
  enteredAt: row.import.enteredAt?.toISOString() ?? null,
})

/** A row with what stood in the cells that are in the way. */
export const toImportRow = (row: typeof importRows.$inferSelect): ImportRow => ({
  ...row,
  problems: row.problems.map((problem, index) => ({
    ...problem,
    found: row.found?.[index] ?? null,
  })),
})
