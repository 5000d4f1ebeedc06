import { z } from 'zod'
import { INFORMATION_CLASSES } from '#shared/policy/informationClasses.ts'
import { instant, page, pageOf } from './common.ts'

/** A value of a class that the reader may not know is hidden, and says so. */
export const auditValue = z.object({
  field: z.string(),
  old: z.string().nullable(),
  new: z.string().nullable(),
  hidden: z.boolean(),
  /** Blanked by two people because it identified somebody. */
  redacted: z.boolean(),
})
export type AuditValue = z.infer<typeof auditValue>

export const auditEvent = z.object({
  position: z.number().int(),
  event: z.string(),
  recordType: z.string(),
  recordLabel: z.string().nullable(),
  /** Site of the record; null where it belongs to the whole study. */
  siteName: z.string().nullable(),
  personName: z.string(),
  role: z.string().nullable(),
  duty: z.string().nullable(),
  /** Site in the person's line of the team list. */
  personSiteName: z.string().nullable(),
  reason: z.string().nullable(),
  /** A reason may repeat the value that it explains, so both are hidden together. */
  reasonHidden: z.boolean(),
  informationClass: z.enum(INFORMATION_CLASSES),
  collectedAt: instant.nullable(),
  enteredAt: instant.nullable(),
  receivedAt: instant,
  localOffset: z.string().nullable(),
  requestId: z.string(),
  values: z.array(auditValue),
  hash: z.string(),
})
export type AuditEvent = z.infer<typeof auditEvent>

const day = z.iso.date({ error: 'A date looks like 2026-03-31.' })

export const auditEventQuery = page
  .extend({
    event: z.string().max(60).optional(),
    person: z.string().trim().max(100).optional(),
    record: z.string().trim().max(120).optional(),
    /** First and last day in UTC, both included. */
    from: day.optional(),
    to: day.optional(),
    after: z
      .string()
      .regex(/^[1-9]\d{0,14}$/, 'This is not a key of a page.')
      .optional(),
  })
  .refine(({ from, to }) => !from || !to || from <= to, {
    path: ['to'],
    message: 'The last day must not come before the first.',
  })
export type AuditEventQuery = z.infer<typeof auditEventQuery>
export const auditEventPage = pageOf(auditEvent)
export type AuditEventPage = z.infer<typeof auditEventPage>

const whole = (digits: RegExp, message: string) =>
  z.string().regex(digits, message).transform(Number)

/** A stretch of the chain: from the event after this position, so many events. Without both: all of it. */
export const chainStretch = z.object({
  after: whole(/^\d{1,15}$/, 'A position is a whole number.').optional(),
  most: whole(/^[1-9]\d{0,5}$/, 'Between 1 and 999,999 events.').optional(),
})
export type ChainStretch = z.infer<typeof chainStretch>

/** What checking the chain, or a stretch of it, found. */
export const chainVerdict = z.object({
  intact: z.boolean(),
  /** Number of events and head as the chain's own record says. */
  count: z.number().int(),
  headHash: z.string(),
  /** Checked up to here; equal to `count` when nothing is left to check. */
  checkedTo: z.number().int(),
  /** Values in this stretch that two people have blanked; the chain holds all the same. */
  redacted: z.number().int(),
  /** The first place that does not hold, in words. */
  firstBreak: z.object({ position: z.number().int(), what: z.string() }).nullable(),
  checkedAt: instant,
})
export type ChainVerdict = z.infer<typeof chainVerdict>
