import { eq } from 'drizzle-orm'
import { z } from 'zod'
import { reader } from '#db/client.ts'
import { jobs } from '#db/schema/jobs.ts'
import { change } from '#server/changes/change.ts'
import { route } from '#server/http/route.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { id } from '#shared/schemas/common.ts'
import { type Job, job } from '#shared/schemas/job.ts'

const params = z.object({ jobId: id })

export const jobRoutes = [
  route({
    method: 'get',
    path: '/api/jobs/:jobId',
    action: 'job.read',
    params,
    of: ({ jobId }) => ({ jobId }),
    returns: job,
    handle: ({ params }) => getJob(params.jobId),
  }),
  route({
    method: 'post',
    path: '/api/jobs/:jobId/cancel',
    action: 'job.cancel',
    params,
    of: ({ jobId }) => ({ jobId }),
    returns: job,
    handle: async ({ actor, params }) => {
      await change({ actor, action: 'job.cancel', of: params }, async (tx) => {
        await tx
          .passing()
          .update(jobs)
          .set({ cancelRequested: true })
          .where(eq(jobs.id, params.jobId))
        tx.note({ recordType: 'job', recordId: params.jobId })
      })
      return getJob(params.jobId)
    },
  }),
]

async function getJob(jobId: string): Promise<Job> {
  const [row] = await reader().select().from(jobs).where(eq(jobs.id, jobId))
  if (!row) throw new AppError('not-found')
  return {
    ...row,
    queuedAt: row.queuedAt.toISOString(),
    finishedAt: row.finishedAt?.toISOString() ?? null,
  }
}
