import { and, asc, eq, lt, or, sql } from 'drizzle-orm'
import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { jobs } from '#db/schema/jobs.ts'
import type { Actor } from '#server/changes/actor.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { writePassing } from '#server/changes/passing.ts'
import type { JobKind } from '#shared/terms/job.ts'

export type JobRow = typeof jobs.$inferSelect

/** A worker that says nothing for so long is taken to be gone, and another takes the job over. */
const HOLD_MS = 60_000
const MOST_ATTEMPTS = 3

/** Puts a job into the queue as part of a change: it exists exactly when the change does. */
export async function enqueue(
  tx: ChangeTx,
  actor: Actor,
  job: { kind: JobKind; recordId: string; payload?: Record<string, unknown>; words: string },
): Promise<string> {
  const id = newId()
  await tx.put(jobs, [
    {
      id,
      studyId: tx.allowed.studyId,
      kind: job.kind,
      state: 'queued',
      recordId: job.recordId,
      payload: { ...job.payload, actor },
      startedBy: actor.personId,
      queuedAt: tx.at,
      progressWords: job.words,
    },
  ])
  return id
}

/** Takes the oldest job that nobody holds; workers of all processes may ask at once. */
export function claimJob(): Promise<JobRow | undefined> {
  return writePassing(async (tx) => {
    const now = new Date()
    const [job] = await tx
      .select()
      .from(jobs)
      .where(or(eq(jobs.state, 'queued'), and(eq(jobs.state, 'running'), lt(jobs.heldUntil, now))))
      .orderBy(asc(jobs.queuedAt))
      .limit(1)
      .for('update', { skipLocked: true })
    if (!job) return undefined
    const attempts = job.attempts + 1
    if (attempts > MOST_ATTEMPTS) {
      await tx
        .update(jobs)
        .set({
          state: 'failed',
          finishedAt: now,
          failure: 'Given up: the work was broken off several times.',
        })
        .where(eq(jobs.id, job.id))
      return undefined
    }
    const held = {
      state: 'running' as const,
      attempts,
      heldUntil: new Date(now.getTime() + HOLD_MS),
    }
    await tx.update(jobs).set(held).where(eq(jobs.id, job.id))
    return { ...job, ...held }
  })
}

/** Says how far a job is and holds it longer. @returns whether somebody asked to stop it */
export async function reportProgress(
  jobId: string,
  progress: { done: number; total: number; words: string },
): Promise<boolean> {
  await writePassing((tx) =>
    tx
      .update(jobs)
      .set({
        progressDone: progress.done,
        progressTotal: progress.total,
        progressWords: progress.words,
        heldUntil: new Date(Date.now() + HOLD_MS),
      })
      .where(eq(jobs.id, jobId)),
  )
  const [row] = await reader()
    .select({ cancelRequested: jobs.cancelRequested })
    .from(jobs)
    .where(eq(jobs.id, jobId))
  return row?.cancelRequested ?? false
}

/** Keeps a job from being taken for abandoned. */
export async function holdJob(jobId: string): Promise<void> {
  await writePassing((tx) =>
    tx
      .update(jobs)
      .set({ heldUntil: new Date(Date.now() + HOLD_MS) })
      .where(eq(jobs.id, jobId)),
  )
}

export async function finishJob(
  jobId: string,
  end: { state: 'done' | 'failed' | 'cancelled'; failure?: string },
): Promise<void> {
  await writePassing((tx) =>
    tx
      .update(jobs)
      .set({
        state: end.state,
        failure: end.failure ?? null,
        finishedAt: new Date(),
        heldUntil: null,
        // Who asked is in the audit trail; the queue keeps no person's data.
        payload: sql`json_object()` as never,
      })
      .where(eq(jobs.id, jobId)),
  )
}
