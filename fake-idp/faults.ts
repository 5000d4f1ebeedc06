import { createSign, type KeyObject } from 'node:crypto'

/** What the provider can be told to get wrong, so that the application can be seen to refuse it. */
export const FAULTS = [
  'wrong-issuer',
  'wrong-nonce',
  'wrong-audience',
  'bad-signature',
  'expired-token',
  'wrong-response-issuer',
] as const
export type Fault = (typeof FAULTS)[number]

/** @param foreign a key that the provider does not publish */
export type SigningKeys = { own: KeyObject; foreign: KeyObject }

type Claims = Record<string, unknown>
const HOUR_S = 3600

/** How each fault changes the claims; the others leave them alone. */
const SPOILT: Partial<Record<Fault, (claims: Claims) => Claims>> = {
  'wrong-issuer': (claims) => ({ ...claims, iss: `${claims.iss}/another` }),
  'wrong-nonce': (claims) => ({ ...claims, nonce: 'another-nonce' }),
  'wrong-audience': (claims) => ({ ...claims, aud: 'another-client' }),
  'expired-token': (claims) => ({
    ...claims,
    iat: Number(claims.iat) - 2 * HOUR_S,
    exp: Number(claims.iat) - HOUR_S,
  }),
}

/**
 * An ID token with the fault in it, signed again (RS256, RFC 7515) so that nothing else is wrong.
 * @param token compact serialisation as the provider made it
 */
export function spoilIdToken(token: string, fault: Fault, keys: SigningKeys): string {
  const [header, payload] = token.split('.') as [string, string]
  const claims: Claims = JSON.parse(Buffer.from(payload, 'base64url').toString())
  const spoilt = SPOILT[fault]?.(claims) ?? claims
  const content = `${header}.${Buffer.from(JSON.stringify(spoilt)).toString('base64url')}`
  const key = fault === 'bad-signature' ? keys.foreign : keys.own
  return `${content}.${createSign('RSA-SHA256').update(content).sign(key, 'base64url')}`
}

/** The redirect back to the application with another provider's name in `iss` (RFC 9207). */
export function spoilResponseIssuer(location: string): string {
  const url = new URL(location)
  if (url.searchParams.has('iss')) url.searchParams.set('iss', 'http://another.example')
  return url.href
}
