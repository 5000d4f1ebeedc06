import { randomBytes } from 'node:crypto'
import { and, eq, gt, lt } from 'drizzle-orm'
import { loginAttempts } from '#db/schema/loginAttempts.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import { writePassing } from '#server/changes/passing.ts'
import { newSecrets, type Secrets } from './provider.ts'

const ATTEMPT_MS = 10 * 60_000

export type Attempt = Secrets & {
  returnTo: string
  startedAt: Date
  signingPersonId: string | null
  signingPurpose: string | null
}

/** Keeps the one-time values here and gives the browser a secret that leads to them. */
export async function startAttempt(
  returnTo: string,
  signing?: { personId: string; purpose: string },
): Promise<{ secret: string; secrets: Secrets }> {
  const secret = randomBytes(32).toString('base64url')
  const secrets = newSecrets()
  const now = new Date()
  await writePassing(async (tx) => {
    await tx.delete(loginAttempts).where(lt(loginAttempts.endsAt, now))
    await tx.insert(loginAttempts).values({
      ...secrets,
      idHash: sha256Hex(secret),
      returnTo,
      startedAt: now,
      endsAt: new Date(now.getTime() + ATTEMPT_MS),
      signingPersonId: signing?.personId ?? null,
      signingPurpose: signing?.purpose ?? null,
    })
  })
  return { secret, secrets }
}

/** Takes the attempt out, once: a second callback finds nothing. */
export function takeAttempt(secret: string): Promise<Attempt | undefined> {
  return writePassing(async (tx) => {
    const key = eq(loginAttempts.idHash, sha256Hex(secret))
    const [attempt] = await tx
      .select()
      .from(loginAttempts)
      .where(and(key, gt(loginAttempts.endsAt, new Date())))
      .for('update')
    await tx.delete(loginAttempts).where(key)
    return attempt
  })
}
