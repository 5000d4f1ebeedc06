import { z } from 'zod'
import { REPORT_PARTS, REPORT_STATES } from '#shared/terms/reportState.ts'
import { id, instant, words } from './common.ts'

export const reportRequest = z.object({
  id,
  title: words(200),
  datasetId: z.uuid({ error: 'Please choose a dataset.' }),
  analysisIds: z
    .array(id)
    .min(1, 'Choose at least one stored analysis.')
    .max(40, 'At most 40.')
    .refine((ids) => new Set(ids).size === ids.length, 'Each analysis once.'),
})
export type ReportRequest = z.infer<typeof reportRequest>

export const reportFile = z.object({
  part: z.enum(REPORT_PARTS),
  pages: z.number().int(),
  sha256: z.string(),
  bytes: z.number().int(),
  storedAt: instant,
})

export const report = z.object({
  id,
  number: z.number().int(),
  state: z.enum(REPORT_STATES),
  title: z.string(),
  datasetHash: z.string(),
  /** How many stored analyses its closed part shows. */
  analysisCount: z.number().int(),
  issuedByName: z.string(),
  issuedById: id,
  /** When it was asked for; the dates in the files are this. */
  issuedAt: instant,
  /** The job that writes it, while it is being written. */
  jobId: id.nullable(),
  /** Why it could not be written. */
  failure: z.string().nullable(),
  /** Parts that are there; the closed part can be opened by oversight and analysts alone. */
  files: z.array(reportFile),
})
export type Report = z.infer<typeof report>
