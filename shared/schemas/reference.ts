import { z } from 'zod'
import { OUTCOMES } from '#shared/terms/outcome.ts'
import { id, page, pageOf } from './common.ts'

/** The reference of a subject: its outcome, and the reference analyser's values by session. Class: reference. */
export const reference = z.object({
  subjectId: id,
  subjectCode: z.string(),
  siteName: z.string(),
  outcome: z.enum(OUTCOMES).nullable(),
  measurements: z.array(
    z.object({ sessionNumber: z.number().int(), analyteId: id, value: z.number() }),
  ),
})
export type Reference = z.infer<typeof reference>

/** In the order of subject code; all of them, or those of one subject or site. */
export const referenceQuery = page.extend({
  code: z.string().trim().max(16).optional(),
  siteId: id.optional(),
  subjectId: id.optional(),
  outcome: z.enum(OUTCOMES).optional(),
})
export type ReferenceQuery = z.infer<typeof referenceQuery>
export const referencePage = pageOf(reference)
