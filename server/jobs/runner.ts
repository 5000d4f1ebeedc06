import { setTimeout as wait } from 'node:timers/promises'
import type { Actor } from '#server/changes/actor.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { JobKind } from '#shared/terms/job.ts'
import { claimJob, finishJob, holdJob, type JobRow, reportProgress } from './queue.ts'

export type JobContext = {
  job: JobRow
  /** On whose behalf the job runs; its changes pass the same policy as that person's requests. */
  actor: Actor
  /** Tells how far the work is. @throws JobCancelled when somebody asked to stop it */
  progress: (done: number, total: number, words: string) => Promise<void>
}

export type JobHandler = {
  run: (context: JobContext) => Promise<void>
  /** Puts the record right when the job ended without its result. */
  ended: (context: JobContext, end: 'failed' | 'cancelled', words: string) => Promise<void>
}

export type JobHandlers = Record<JobKind, JobHandler>

export class JobCancelled extends Error {}

const IDLE_WAIT_MS = 250
const BEAT_MS = 15_000

/** Works on jobs until the signal says stop; a job under way is finished first. */
export async function workOnJobs(handlers: JobHandlers, signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    try {
      if (await runNextJob(handlers)) continue
    } catch (error) {
      // The database may be away for a moment; the queue is still there when it is back.
      console.error(JSON.stringify({ level: 'warn', event: 'jobs.waiting', fault: String(error) }))
    }
    await wait(IDLE_WAIT_MS, undefined, { signal }).catch(() => undefined)
  }
}

/** Runs one job, if there is one. */
export async function runNextJob(handlers: JobHandlers): Promise<boolean> {
  const job = await claimJob()
  if (!job) return false
  const handler = handlers[job.kind]
  const stored = job.payload.actor as Actor
  const context: JobContext = {
    job,
    actor: { ...stored, idleExpiresAt: new Date(stored.idleExpiresAt) },
    progress: async (done, total, words) => {
      if (await reportProgress(job.id, { done, total, words })) throw new JobCancelled()
    },
  }
  // Long steps without a word on progress, such as the trail of a large import, show life all the same.
  const beat = setInterval(() => void holdJob(job.id).catch(() => undefined), BEAT_MS)
  try {
    await handler.run(context)
    await finishJob(job.id, { state: 'done' })
  } catch (error) {
    const end = error instanceof JobCancelled ? 'cancelled' : 'failed'
    const words =
      end === 'cancelled' ? 'Stopped on request. Nothing was changed.' : failureWords(error, job)
    await handler.ended(context, end, words)
    await finishJob(job.id, { state: end, failure: words.slice(0, 500) })
  } finally {
    clearInterval(beat)
  }
  return true
}

function failureWords(error: unknown, job: JobRow): string {
  if (error instanceof AppError)
    return [error.message, ...Object.values(error.detail.fields ?? {})].join(' ')
  console.error(
    JSON.stringify({
      level: 'error',
      job: job.id,
      kind: job.kind,
      fault: String((error as Error)?.stack ?? error),
    }),
  )
  return `Something went wrong on our side (job ${job.id}).`
}
