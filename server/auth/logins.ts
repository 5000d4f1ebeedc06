import { randomBytes } from 'node:crypto'
import { and, eq, gt, lt, or } from 'drizzle-orm'
import type { Request } from 'express'
import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { logins } from '#db/schema/logins.ts'
import { people } from '#db/schema/people.ts'
import type { Actor } from '#server/changes/actor.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import { recordInstallationEvent, writePassing } from '#server/changes/passing.ts'
import { config } from '#server/config.ts'
import { requestId } from '#server/http/requestId.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { readCookie } from './cookies.ts'
import type { PersonClaims } from './provider.ts'

const MINUTE_MS = 60_000
const idleMs = () => config().BREATHMARK_IDLE_MINUTES * MINUTE_MS

export type SignedIn = Actor & { idToken: string | null }

/** Who sends the request. @throws AppError not-signed-in */
export async function signedIn(request: Request): Promise<SignedIn> {
  const secret = readCookie(request, 'breathmark-login')
  if (!secret) throw new AppError('not-signed-in')
  const now = new Date()
  const idHash = sha256Hex(secret)
  const [found] = await reader()
    .select({ login: logins, person: people })
    .from(logins)
    .innerJoin(people, eq(people.id, logins.personId))
    .where(
      and(
        eq(logins.idHash, idHash),
        gt(logins.endsAt, now),
        gt(logins.lastSeenAt, new Date(now.getTime() - idleMs())),
        eq(people.disabled, false),
      ),
    )
  if (!found) throw new AppError('not-signed-in')
  // Once a minute is enough to know that somebody is still there.
  const seenAt =
    now.getTime() - found.login.lastSeenAt.getTime() > MINUTE_MS ? now : found.login.lastSeenAt
  if (seenAt === now)
    await writePassing((tx) =>
      tx.update(logins).set({ lastSeenAt: now }).where(eq(logins.idHash, idHash)),
    )
  return {
    personId: found.person.id,
    name: found.person.name,
    email: found.person.email,
    roles: found.person.roles,
    loginIdHash: idHash,
    requestId: requestId(request),
    localOffset: localOffset(request),
    idleExpiresAt: new Date(Math.min(seenAt.getTime() + idleMs(), found.login.endsAt.getTime())),
    idToken: found.login.idToken,
  }
}

export const signedInActor = (request: Request): Promise<Actor> => signedIn(request)

/** What the browser says of its clock; anything else than an offset is no offset. */
function localOffset(request: Request): string | null {
  const said = request.get('x-breathmark-offset')
  return said && /^[+-]\d{2}:\d{2}$/.test(said) ? said : null
}

/** Starts a login under a new secret, ends the one that the browser held before, and says so in the trail. */
export async function startLogin(request: Request, claims: PersonClaims): Promise<string> {
  const secret = randomBytes(32).toString('base64url')
  const now = new Date()
  const previous = readCookie(request, 'breathmark-login')
  const personId = await writePassing(async (tx) => {
    const { iss: issuer, sub: subject, name, roles } = claims
    const email = claims.email ?? null
    await tx
      .insert(people)
      .values({
        id: newId(),
        issuer,
        subject,
        name,
        email,
        roles,
        firstSeenAt: now,
        lastSeenAt: now,
      })
      .onDuplicateKeyUpdate({ set: { name, email, roles, lastSeenAt: now } })
    const [person] = await tx
      .select({ id: people.id, disabled: people.disabled })
      .from(people)
      .where(and(eq(people.issuer, issuer), eq(people.subject, subject)))
    if (!person || person.disabled) throw new AppError('not-signed-in')
    await tx
      .delete(logins)
      .where(or(lt(logins.endsAt, now), eq(logins.idHash, sha256Hex(previous ?? ''))))
    await tx.insert(logins).values({
      idHash: sha256Hex(secret),
      personId: person.id,
      startedAt: now,
      lastSeenAt: now,
      endsAt: new Date(now.getTime() + config().BREATHMARK_LOGIN_MINUTES * MINUTE_MS),
      authenticatedAt: new Date(claims.auth_time * 1000),
      idToken: claims.idToken,
    })
    return person.id
  })
  await recordLogin(request, 'login.started', { personId, name: claims.name })
  return secret
}

/** Ends a login here; the provider's own end is a page to visit. */
export async function endLogin(request: Request, actor: SignedIn): Promise<void> {
  await writePassing((tx) => tx.delete(logins).where(eq(logins.idHash, actor.loginIdHash)))
  await recordLogin(request, 'login.ended', actor)
}

export function recordLogin(
  request: Request,
  event: 'login.started' | 'login.ended' | 'login.refused' | 'login.reauthenticated',
  person: { personId: string | null; name: string },
): Promise<void> {
  return recordInstallationEvent(
    { event, recordType: 'login', recordId: requestId(request), fields: [] },
    {
      actor: {
        personId: person.personId,
        name: person.name,
        requestId: requestId(request),
        localOffset: localOffset(request),
      },
      line: null,
      reason: null,
      at: new Date(),
    },
  )
}
