import { z } from 'zod'
import { id, instant, page, pageOf } from './common.ts'

/** A breath session and the sensor's values in it. Class: index. */
export const session = z.object({
  id,
  subjectId: id,
  subjectCode: z.string(),
  siteName: z.string(),
  number: z.number().int(),
  startedAt: instant.nullable(),
  values: z.array(z.object({ analyteId: id, value: z.number(), belowLod: z.boolean() })),
})
export type Session = z.infer<typeof session>

/** Sessions in the order of subject code and number; all of them, or those of one subject or site. */
export const sessionQuery = page.extend({
  code: z.string().trim().max(16).optional(),
  siteId: id.optional(),
  subjectId: id.optional(),
})
export type SessionQuery = z.infer<typeof sessionQuery>
export const sessionPage = pageOf(session)
