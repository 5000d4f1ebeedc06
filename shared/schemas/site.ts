import { z } from 'zod'
import { id, reasonForChange, words } from './common.ts'

export const siteInput = z.object({
  name: words(120),
  prefix: z
    .string()
    .trim()
    .regex(
      /^[A-HJ-NP-Z][A-HJ-NP-Z0-9]{1,3}$/,
      'Two to four capital letters or digits, a letter first, without I and O: N04.',
    ),
  plannedSubjects: z
    .number({ error: 'Please give a number.' })
    .int('A whole number.')
    .positive('Must be more than 0.')
    .max(1_000_000)
    .nullable(),
})
export type SiteInput = z.infer<typeof siteInput>

export const site = z.object({
  id,
  name: z.string(),
  prefix: z.string(),
  plannedSubjects: z.number().int().nullable(),
  version: z.number().int(),
  subjectCount: z.number().int(),
})
export type Site = z.infer<typeof site>

/** The prefix stands in subject codes and cannot change any more. */
export const siteCorrection = siteInput
  .omit({ prefix: true })
  .extend({ version: z.number().int(), reasonForChange })
export type SiteCorrection = z.infer<typeof siteCorrection>
