import { z } from 'zod'
import { INFORMATION_CLASSES } from '#shared/policy/informationClasses.ts'
import { instant, page, pageOf } from './common.ts'

/** A value of a class that the reader may not know is hidden, and says so. */
export const auditValue = z.object({
  field: z.string(),
  old: z.string().nullable(),
  new: z.string().nullable(),
  hidden: z.boolean(),
  redacted: z.boolean(),
})

export const auditEvent = z.object({
  position: z.number().int(),
  event: z.string(),
  recordType: z.string(),
  recordLabel: z.string().nullable(),
  siteName: z.string().nullable(),
  personName: z.string(),
  role: z.string().nullable(),
  duty: z.string().nullable(),
  reason: z.string().nullable(),
  informationClass: z.enum(INFORMATION_CLASSES),
  collectedAt: instant.nullable(),
  enteredAt: instant.nullable(),
  receivedAt: instant,
  localOffset: z.string().nullable(),
  values: z.array(auditValue),
  hash: z.string(),
})
export type AuditEvent = z.infer<typeof auditEvent>

export const auditEventQuery = page.extend({
  event: z.string().max(60).optional(),
  person: z.string().trim().max(100).optional(),
  record: z.string().trim().max(120).optional(),
  from: z.iso.date({ error: 'A date looks like 2026-03-31.' }).optional(),
  to: z.iso.date({ error: 'A date looks like 2026-03-31.' }).optional(),
})
export type AuditEventQuery = z.infer<typeof auditEventQuery>
export const auditEventPage = pageOf(auditEvent)

/** What checking the whole chain found. */
export const chainVerdict = z.object({
  intact: z.boolean(),
  count: z.number().int(),
  headHash: z.string(),
  /** The first place that does not hold, in words. */
  firstBreak: z.object({ position: z.number().int(), what: z.string() }).nullable(),
  checkedAt: instant,
})
export type ChainVerdict = z.infer<typeof chainVerdict>
