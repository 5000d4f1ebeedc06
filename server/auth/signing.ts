import { and, eq, gt, isNull } from 'drizzle-orm'
import type { Request } from 'express'
import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { people } from '#db/schema/people.ts'
import { signingGrants } from '#db/schema/signingGrants.ts'
import type { Actor } from '#server/changes/actor.ts'
import { writePassing } from '#server/changes/passing.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Attempt } from './attempts.ts'
import { recordLogin, signedIn } from './logins.ts'
import type { PersonClaims } from './provider.ts'

const GRANT_MS = 5 * 60_000
/** Clocks of the provider and of this server may differ by so much. */
const CLOCK_SKEW_MS = 2_000

/** `action:record`, such as lock.approve:4f0c… */
export const SIGNING_PURPOSE = /^[a-zA-Z.]{3,60}:[0-9a-f-]{36}$/

/**
 * Accepts a fresh authentication of the very person who is signed in and asked for it. `max_age=0`
 * alone is not proof: the time of authentication must lie after the moment at which we asked.
 */
export async function grantSigning(
  request: Request,
  attempt: Attempt,
  claims: PersonClaims,
): Promise<void> {
  const actor = await signedIn(request)
  const [person] = await reader().select().from(people).where(eq(people.id, actor.personId))
  const authenticatedAt = new Date(claims.auth_time * 1000)
  const same = person?.issuer === claims.iss && person.subject === claims.sub
  if (!same || actor.personId !== attempt.signingPersonId)
    throw new Error('Another person authenticated.')
  // auth_time counts whole seconds.
  if (authenticatedAt.getTime() + 1000 + CLOCK_SKEW_MS < attempt.startedAt.getTime())
    throw new Error('The provider did not ask again.')
  const now = new Date()
  await writePassing((tx) =>
    tx.insert(signingGrants).values({
      id: newId(),
      personId: actor.personId,
      loginIdHash: actor.loginIdHash,
      purpose: attempt.signingPurpose!,
      authenticatedAt,
      endsAt: new Date(now.getTime() + GRANT_MS),
    }),
  )
  await recordLogin(request, 'login.reauthenticated', actor)
}

/**
 * Uses up the fresh authentication for one purpose, such as `lock.approve:<id>`.
 * @throws AppError signature-needed, with the address at which to authenticate again
 */
export function spendSigningGrant(
  actor: Actor,
  purpose: string,
): Promise<{ authenticatedAt: Date }> {
  return writePassing(async (tx) => {
    const now = new Date()
    const [grant] = await tx
      .select()
      .from(signingGrants)
      .where(
        and(
          eq(signingGrants.loginIdHash, actor.loginIdHash),
          eq(signingGrants.purpose, purpose),
          eq(signingGrants.personId, actor.personId),
          isNull(signingGrants.usedAt),
          gt(signingGrants.endsAt, now),
        ),
      )
      .for('update')
    if (!grant)
      throw new AppError('signature-needed', {
        more: { signAt: `/auth/sign?purpose=${encodeURIComponent(purpose)}` },
      })
    await tx.update(signingGrants).set({ usedAt: now }).where(eq(signingGrants.id, grant.id))
    return { authenticatedAt: grant.authenticatedAt }
  })
}
