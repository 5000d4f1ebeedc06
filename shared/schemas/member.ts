import { z } from 'zod'
import { DUTIES, DUTIES_OF_ROLE, ROLES, SITE_DUTIES } from '#shared/policy/people.ts'
import { id, instant, reasonForChange } from './common.ts'

const duty = z
  .enum(DUTIES as [string, ...string[]])
  .transform((value) => value as (typeof DUTIES)[number])

export const memberInput = z
  .object({
    id,
    personId: z.uuid({ error: 'Please choose a person.' }),
    role: z.enum(ROLES, { error: 'Please choose a role.' }),
    duty: duty.nullable(),
    siteId: id.nullable(),
  })
  .superRefine((line, context) => {
    if (line.duty && !(DUTIES_OF_ROLE[line.role] as readonly string[]).includes(line.duty))
      context.addIssue({
        code: 'custom',
        path: ['duty'],
        message: 'This duty does not belong to the role.',
      })
    if (line.duty && SITE_DUTIES.includes(line.duty) && line.siteId === null)
      context.addIssue({ code: 'custom', path: ['siteId'], message: 'Please choose the site.' })
    if (line.duty === 'studyLead' && line.siteId !== null)
      context.addIssue({
        code: 'custom',
        path: ['siteId'],
        message: 'A study lead belongs to the whole study.',
      })
    if (line.siteId !== null && line.role !== 'coordinator')
      context.addIssue({
        code: 'custom',
        path: ['siteId'],
        message: 'Monitors and analysts belong to the whole study.',
      })
  })
export type MemberInput = z.infer<typeof memberInput>

/** A line of the team list; one that has ended stays, with when and why. */
export const member = z.object({
  id,
  personId: id,
  personName: z.string(),
  role: z.enum(ROLES),
  duty: z.string().nullable(),
  siteId: id.nullable(),
  siteName: z.string().nullable(),
  startsAt: instant,
  endsAt: instant.nullable(),
  endReason: z.string().nullable(),
})
export type Member = z.infer<typeof member>

export const memberEnd = z.object({ reasonForChange })
export type MemberEnd = z.infer<typeof memberEnd>

/** Somebody whom the identity provider has vouched for and who may be added to the team. */
export const person = z.object({ id, name: z.string(), roles: z.array(z.enum(ROLES)) })
export type Person = z.infer<typeof person>
