import { and, desc, eq, gt, inArray, or } from 'drizzle-orm'
import { type Reader, reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { jobs } from '#db/schema/jobs.ts'
import { people } from '#db/schema/people.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { enqueue } from '#server/jobs/queue.ts'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { AnalysisRequest, AnalysisRun } from '#shared/schemas/analysis.ts'
import { requireAnalytes } from './computeAnalysis.ts'
import { datasetOf } from './datasetOf.ts'

const KIND = 'analysis.run'
/** How long an ended run is still told of. */
const TOLD_MS = 24 * 3_600_000
const MOST_TOLD = 20

/**
 * Asks for an analysis that takes a while; a job computes it and stores it under the same key.
 * @throws AppError invalid (no such dataset or analyte), already-exists
 */
export async function askForRun(
  actor: Actor,
  studyId: string,
  request: AnalysisRequest,
): Promise<AnalysisRun> {
  const dataset = await datasetOf(studyId, request.datasetId)
  requireAnalytes(dataset, request.parameters)
  await change({ actor, action: 'analysis.run', of: { studyId } }, async (tx) => {
    if (await isTaken(tx.read, request.id)) throw new AppError('already-exists')
    await enqueue(tx, actor, {
      kind: KIND,
      recordId: request.id,
      payload: { request },
      words: 'Waiting for its turn',
    })
    tx.note({
      event: 'analysis.requested',
      recordType: 'analysis',
      recordId: request.id,
      fields: [
        { field: 'kind', informationClass: 'none', new: request.parameters.kind },
        { field: 'seed', informationClass: 'none', new: drawsOf(request.parameters)?.seed ?? null },
      ],
    })
  })
  return (await listRuns(actor, studyId)).find((run) => run.id === request.id)!
}

async function isTaken(read: Reader, id: string): Promise<boolean> {
  const [stored] = await read.select({ id: analyses.id }).from(analyses).where(eq(analyses.id, id))
  const [asked] = await read
    .select({ id: jobs.id })
    .from(jobs)
    .where(and(eq(jobs.kind, KIND), eq(jobs.recordId, id)))
  return stored !== undefined || asked !== undefined
}

/** Runs under way and those that ended without a result within a day, the newest first. */
export async function listRuns(actor: Actor, studyId: string): Promise<AnalysisRun[]> {
  const rows = await reader()
    .select({ job: jobs, askedByName: people.name })
    .from(jobs)
    .leftJoin(people, eq(people.id, jobs.startedBy))
    .where(
      and(
        eq(jobs.studyId, studyId),
        eq(jobs.kind, KIND),
        or(
          inArray(jobs.state, ['queued', 'running']),
          and(
            inArray(jobs.state, ['failed', 'cancelled']),
            gt(jobs.finishedAt, new Date(Date.now() - TOLD_MS)),
          ),
        ),
      ),
    )
    .orderBy(desc(jobs.queuedAt))
    .limit(MOST_TOLD)
  return rows.map(({ job, askedByName }) => ({
    id: job.recordId,
    jobId: job.id,
    title: (job.payload.request as AnalysisRequest | undefined)?.title ?? null,
    state: job.state,
    progressDone: job.progressDone,
    progressTotal: job.progressTotal,
    progressWords: job.progressWords,
    askedAt: job.queuedAt.toISOString(),
    askedByName: askedByName ?? '',
    own: job.startedBy === actor.personId,
    finishedAt: job.finishedAt?.toISOString() ?? null,
    failure: job.failure,
  }))
}
