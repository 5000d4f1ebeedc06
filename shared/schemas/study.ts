import { z } from 'zod'
import { DUTIES, ROLES, STUDY_KINDS } from '#shared/policy/people.ts'
import { caution, id, instant, words } from './common.ts'
import { analyteInput, protocolDocument, strangeAnalytes } from './protocol.ts'
import { siteInput } from './site.ts'

/** A study of earlier data as its lead sets it up, in one go: the study, its sites, analytes and protocol. */
export const studyInput = z
  .object({
    id,
    kind: z.literal('earlierData'),
    /** For teaching and trying out: said on every page that the data are invented. */
    demonstration: z.boolean().optional(),
    code: z
      .string()
      .trim()
      .regex(
        /^[A-Z0-9][A-Z0-9-]{1,18}[A-Z0-9]$/,
        'Three to 20 capital letters, digits or hyphens, such as LARK-2.',
      ),
    title: words(200),
    sites: z.array(siteInput).min(1, 'At least one site.').max(100, 'At most 100.'),
    analytes: z.array(analyteInput).min(1, 'At least one analyte.').max(40, 'At most 40.'),
    document: protocolDocument,
  })
  .superRefine((study, context) => {
    const issue = (path: (string | number)[], message: string) =>
      context.addIssue({ code: 'custom', path, message })
    const repeated = (values: string[]) =>
      values.flatMap((value, index) => (values.indexOf(value) === index ? [] : [index]))

    for (const index of repeated(study.sites.map((site) => site.prefix)))
      issue(['sites', index, 'prefix'], 'Another site has this prefix.')
    for (const index of repeated(study.sites.map((site) => site.name.toLowerCase())))
      issue(['sites', index, 'name'], 'Another site has this name.')
    const keys = study.analytes.map((analyte) => analyte.key)
    for (const index of repeated(keys))
      issue(['analytes', index, 'name'], 'This analyte is there already.')
    for (const { path, message } of strangeAnalytes(study.document, keys))
      issue(['document', ...path], message)
  })
export type StudyInput = z.infer<typeof studyInput>

/** The person's own lines of the team list: the browser asks the policy table with them. */
export const viewer = z.array(
  z.object({
    role: z.enum(ROLES),
    duty: z.enum(DUTIES as [string, ...string[]]).nullable(),
    siteId: id.nullable(),
  }),
)

export const studySummary = z.object({
  id,
  code: z.string(),
  title: z.string(),
  kind: z.enum(STUDY_KINDS),
  demonstration: z.boolean(),
  createdAt: instant,
  lockedAt: instant.nullable(),
  subjectCount: z.number().int(),
  roles: z.array(z.enum(ROLES)),
})
export type StudySummary = z.infer<typeof studySummary>

/** A study as its frame shows it: who the reader is in it, how far it is, and the caution to print. */
export const study = z.object({
  id,
  code: z.string(),
  title: z.string(),
  kind: z.enum(STUDY_KINDS),
  demonstration: z.boolean(),
  createdAt: instant,
  lockedAt: instant.nullable(),
  releasedAt: instant.nullable(),
  caution,
  viewer,
  /** Live counts for the course. Numbers of a class that the reader may not know are left out. */
  counts: z.object({
    protocolVersion: z.number().int(),
    plannedSubjects: z.number().int().nullable(),
    subjects: z.number().int(),
    sessions: z.number().int(),
    /** Subjects whose reference standard was done, whatever it said. */
    decidedOutcomes: z.number().int(),
    auditEvents: z.number().int(),
    locks: z.number().int(),
    openLockRequest: z.boolean(),
    analyses: z.number().int(),
    reports: z.number().int(),
  }),
})
export type Study = z.infer<typeof study>
