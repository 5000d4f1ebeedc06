import { z } from 'zod'
import { ROLES } from '#shared/policy/people.ts'
import { id, instant } from './common.ts'

/** Who is signed in, until when, and where. */
export const me = z.object({
  person: z.object({
    id,
    name: z.string(),
    email: z.string().nullable(),
    roles: z.array(z.enum(ROLES)),
  }),
  idleExpiresAt: instant,
  installation: z.object({
    name: z.string(),
    /** The identity provider is the local stand-in: accounts are invented. */
    standIn: z.boolean(),
  }),
})
export type Me = z.infer<typeof me>
