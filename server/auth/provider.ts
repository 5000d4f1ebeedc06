import * as oidc from 'openid-client'
import { z } from 'zod'
import { config } from '#server/config.ts'
import { ROLES, type Role } from '#shared/policy/people.ts'

let discovered: Promise<oidc.Configuration> | undefined

/** The identity provider as it describes itself; asked once, and again after a failure. */
function provider(): Promise<oidc.Configuration> {
  discovered ??= discover().catch((error: unknown) => {
    discovered = undefined
    throw error
  })
  return discovered
}

function discover(): Promise<oidc.Configuration> {
  const { BREATHMARK_OIDC_ISSUER, BREATHMARK_OIDC_CLIENT_ID, BREATHMARK_OIDC_CLIENT_SECRET } =
    config()
  const issuer = new URL(BREATHMARK_OIDC_ISSUER)
  const loopback = ['127.0.0.1', 'localhost', '[::1]'].includes(issuer.hostname)
  return oidc.discovery(
    issuer,
    BREATHMARK_OIDC_CLIENT_ID,
    BREATHMARK_OIDC_CLIENT_SECRET,
    undefined,
    {
      execute: [
        // Signatures of tokens are checked even though they come straight from the provider.
        oidc.enableNonRepudiationChecks,
        // Only a provider on this very machine may be spoken to without TLS.
        ...(loopback ? [oidc.allowInsecureRequests] : []),
      ],
      timeout: 10,
    },
  )
}

const callbackUrl = () => new URL('/auth/callback', config().BREATHMARK_PUBLIC_URL).href

export type Secrets = { state: string; nonce: string; codeVerifier: string }

/** New one-time values for one authorisation request. */
export const newSecrets = (): Secrets => ({
  state: oidc.randomState(),
  nonce: oidc.randomNonce(),
  codeVerifier: oidc.randomPKCECodeVerifier(),
})

/** Where to send the browser; `freshly` makes the provider ask for the secret again. */
export async function authorisationUrl(secrets: Secrets, freshly: boolean): Promise<string> {
  return oidc.buildAuthorizationUrl(await provider(), {
    redirect_uri: callbackUrl(),
    scope: 'openid profile email',
    state: secrets.state,
    nonce: secrets.nonce,
    code_challenge: await oidc.calculatePKCECodeChallenge(secrets.codeVerifier),
    code_challenge_method: 'S256',
    ...(freshly ? { prompt: 'login', max_age: '0' } : {}),
  }).href
}

const claimsOfPerson = z.object({
  iss: z.string().max(255),
  sub: z.string().min(1).max(255),
  name: z.string().min(1).max(200),
  email: z.email().max(254).optional(),
  roles: z
    .array(z.string())
    .transform((roles) => ROLES.filter((role) => roles.includes(role)) as Role[]),
  auth_time: z.number().int(),
})
export type PersonClaims = z.infer<typeof claimsOfPerson> & { idToken: string }

/**
 * Exchanges the code and checks everything about the token: issuer, audience, signature, times,
 * nonce, state, code verifier. @throws whatever does not hold
 */
export async function claimsFromCallback(
  pathAndQuery: string,
  secrets: Secrets,
): Promise<PersonClaims> {
  const tokens = await oidc.authorizationCodeGrant(
    await provider(),
    new URL(pathAndQuery, config().BREATHMARK_PUBLIC_URL),
    {
      pkceCodeVerifier: secrets.codeVerifier,
      expectedState: secrets.state,
      expectedNonce: secrets.nonce,
      idTokenExpected: true,
    },
  )
  return { ...claimsOfPerson.parse(tokens.claims()), idToken: tokens.id_token! }
}

/** The provider's page that ends its own sign-in, or our first page where it has none. */
export async function signOutUrl(idToken: string | null): Promise<string> {
  const home = new URL('/', config().BREATHMARK_PUBLIC_URL).href
  const configuration = await provider()
  if (!idToken || !configuration.serverMetadata().end_session_endpoint) return home
  return oidc.buildEndSessionUrl(configuration, {
    id_token_hint: idToken,
    post_logout_redirect_uri: home,
  }).href
}
