import { z } from 'zod'
import { REPORT_PARTS, REPORT_STATES } from '#shared/terms/reportState.ts'
import { id, instant, words } from './common.ts'

export const reportRequest = z.object({
  id,
  title: words(200),
  datasetId: id,
  analysisIds: z.array(id).min(1, 'Choose at least one stored analysis.').max(40, 'At most 40.'),
})
export type ReportRequest = z.infer<typeof reportRequest>

export const report = z.object({
  id,
  number: z.number().int(),
  state: z.enum(REPORT_STATES),
  title: z.string(),
  datasetHash: z.string(),
  issuedByName: z.string(),
  issuedAt: instant,
  jobId: id.nullable(),
  /** Parts that are there; the closed part can be opened by oversight and analysts alone. */
  files: z.array(
    z.object({
      part: z.enum(REPORT_PARTS),
      pages: z.number().int(),
      sha256: z.string(),
      bytes: z.number().int(),
      storedAt: instant,
    }),
  ),
})
export type Report = z.infer<typeof report>
