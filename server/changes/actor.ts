import type { Role } from '#shared/policy/people.ts'

/** The signed-in person behind a request. */
export type Actor = {
  personId: string
  name: string
  email: string | null
  roles: readonly Role[]
  /** SHA-256 of the login's secret. */
  loginIdHash: string
  requestId: string
  /** Offset from UTC where the person sits, such as +01:00, as the browser says. */
  localOffset: string | null
  /** When the login ends if nothing more comes. */
  idleExpiresAt: Date
}
