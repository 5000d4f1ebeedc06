import { z } from 'zod'
import { AGE_BANDS, SEXES } from '#shared/terms/subject.ts'
import { id, instant, page, pageOf, reasonForChange } from './common.ts'

const sex = z.enum(SEXES, { error: 'Please choose.' })
const ageBand = z.enum(AGE_BANDS, { error: 'Please choose an age band.' })

export const subjectInput = z.object({ id, sex, ageBand })
export type SubjectInput = z.infer<typeof subjectInput>

export const subjectCorrection = z.object({
  sex,
  ageBand,
  version: z.number().int(),
  reasonForChange,
})
export type SubjectCorrection = z.infer<typeof subjectCorrection>

export const subject = z.object({
  id,
  code: z.string(),
  siteId: id,
  siteName: z.string(),
  sex: z.enum(SEXES).nullable(),
  ageBand: z.enum(AGE_BANDS).nullable(),
  enrolledAt: instant,
  covariates: z.record(z.string(), z.union([z.string(), z.number()])),
  sessionCount: z.number().int(),
  /** Whether the reference standard was done, not what it said: a state, of no class. */
  outcomeDecided: z.boolean(),
  importNumber: z.number().int().nullable(),
  version: z.number().int(),
})
export type Subject = z.infer<typeof subject>

/** What a subject may still lack. */
export const SUBJECT_NEEDS = ['session', 'outcome'] as const

export const SUBJECT_ORDERS = ['code', 'enrolledAt'] as const
export const subjectQuery = page.extend({
  code: z.string().trim().max(16).optional(),
  siteId: id.optional(),
  sex: sex.optional(),
  needs: z.enum(SUBJECT_NEEDS).optional(),
  order: z.enum(SUBJECT_ORDERS).optional(),
  descending: z.enum(['true', 'false']).optional(),
})
export type SubjectQuery = z.infer<typeof subjectQuery>
export const subjectPage = pageOf(subject)
