import { createPrivateKey, generateKeyPairSync, randomBytes } from 'node:crypto'
import Provider, { type KoaContextWithOIDC } from 'oidc-provider'
import { type Fault, type SigningKeys, spoilIdToken, spoilResponseIssuer } from './faults.ts'
import { faultPage, signedOutPage, signOutPage } from './pages.ts'
import { personOf } from './people.ts'

const HOUR_S = 3600

export type ProviderOptions = {
  issuer: string
  clientId: string
  clientSecret: string
  redirectUris: string[]
  postLogoutRedirectUris: string[]
  /** RSA private key, PEM (PKCS #8); a new one where left out. Kept, tokens stay valid over a restart. */
  signingKey?: string
}

/**
 * An OpenID provider in memory: authorisation code with PKCE, one client, invented people.
 * @param currentFault asked at every answer
 */
export function createProvider(
  options: ProviderOptions,
  currentFault: () => Fault | null,
): Provider {
  const newKey = () => generateKeyPairSync('rsa', { modulusLength: 2048 }).privateKey
  const own = options.signingKey ? createPrivateKey(options.signingKey) : newKey()
  const foreign = newKey()
  const provider = new Provider(options.issuer, {
    clients: [
      {
        client_id: options.clientId,
        client_secret: options.clientSecret,
        redirect_uris: options.redirectUris,
        post_logout_redirect_uris: options.postLogoutRedirectUris,
        require_auth_time: true,
      },
    ],
    jwks: { keys: [{ ...own.export({ format: 'jwk' }), use: 'sig', alg: 'RS256' }] },
    claims: {
      openid: ['sub', 'acr', 'amr'],
      profile: ['name', 'roles', 'zoneinfo'],
      email: ['email', 'email_verified'],
    },
    // Name, e-mail and roles travel in the ID token itself, as hospital providers do it.
    conformIdTokenClaims: false,
    findAccount: (_context, subject) => {
      const person = personOf(subject)
      if (!person) return undefined
      const { name, email, roles } = person
      return {
        accountId: subject,
        claims: () => ({
          sub: subject,
          name,
          email,
          email_verified: true,
          roles,
          zoneinfo: 'Europe/Berlin',
        }),
      }
    },
    pkce: { required: () => true },
    features: {
      devInteractions: { enabled: false },
      rpInitiatedLogout: {
        enabled: true,
        logoutSource: (context, form) => {
          context.body = signOutPage(form)
        },
        postLogoutSuccessSource: (context) => {
          context.body = signedOutPage()
        },
      },
    },
    interactions: { url: (_context, { uid }) => `/interaction/${uid}` },
    // The hospital has agreed to its own application: nobody is asked for consent.
    loadExistingGrant: async (context) => {
      const grant = new context.oidc.provider.Grant({
        clientId: context.oidc.client!.clientId,
        accountId: context.oidc.session!.accountId,
      })
      grant.addOIDCScope('openid profile email')
      await grant.save()
      return grant
    },
    renderError: (context, out) => {
      context.type = 'html'
      context.body = faultPage(out.error_description ?? out.error)
    },
    cookies: {
      keys: [randomBytes(32).toString('hex')],
      // Cookies ignore ports: these names must not meet the application's.
      names: {
        session: 'stand-in-session',
        interaction: 'stand-in-interaction',
        resume: 'stand-in-resume',
      },
    },
    ttl: {
      AccessToken: HOUR_S,
      AuthorizationCode: 60,
      Grant: 12 * HOUR_S,
      IdToken: HOUR_S,
      Interaction: HOUR_S,
      Session: 12 * HOUR_S,
    },
  })
  provider.use(async (context, next) => {
    await next()
    const fault = currentFault()
    if (fault) spoil(context as KoaContextWithOIDC, fault, { own, foreign })
  })
  return provider
}

/** Puts the fault into the finished answer; the provider's own code stays as it is. */
function spoil(context: KoaContextWithOIDC, fault: Fault, keys: SigningKeys): void {
  const body = context.body as { id_token?: string } | undefined
  if (context.oidc?.route === 'token' && body?.id_token)
    context.body = { ...body, id_token: spoilIdToken(body.id_token, fault, keys) }
  const location = context.response.get('location')
  if (fault === 'wrong-response-issuer' && /[?&]iss=/.test(location))
    context.set('location', spoilResponseIssuer(location))
}
