import { z } from 'zod'
import { JOB_KINDS, JOB_STATES } from '#shared/terms/job.ts'
import { id, instant } from './common.ts'

/** Work under way: how far it is, in numbers and words. */
export const job = z.object({
  id,
  kind: z.enum(JOB_KINDS),
  state: z.enum(JOB_STATES),
  recordId: id,
  progressDone: z.number().int(),
  progressTotal: z.number().int(),
  progressWords: z.string().nullable(),
  queuedAt: instant,
  finishedAt: instant.nullable(),
  failure: z.string().nullable(),
})
export type Job = z.infer<typeof job>
