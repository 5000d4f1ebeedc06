import { randomBytes } from 'node:crypto'
import * as oidc from 'openid-client'
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import { freePort } from '#db/ports.ts'
import { FAULTS, type Fault } from '../../fake-idp/faults.ts'
import { PEOPLE } from '../../fake-idp/people.ts'
import { type FakeIdp, startFakeIdp } from '../../fake-idp/server.ts'
import { signInAtProvider } from '../support/browserlessSignIn.ts'

const CALLBACK = 'http://127.0.0.1:9/auth/callback'
const HOME = 'http://127.0.0.1:9/'
const clientSecret = randomBytes(24).toString('hex')
let idp: FakeIdp
let configuration: oidc.Configuration

beforeAll(async () => {
  idp = await startFakeIdp({
    port: await freePort(),
    clientId: 'breathmark',
    clientSecret,
    redirectUris: [CALLBACK],
    postLogoutRedirectUris: [HOME],
    controls: true,
  })
  configuration = await oidc.discovery(new URL(idp.issuer), 'breathmark', clientSecret, undefined, {
    execute: [oidc.enableNonRepudiationChecks, oidc.allowInsecureRequests],
  })
})
afterEach(() => idp.setFault(null))
afterAll(() => idp.stop())

/** A whole authorisation code flow as the application does it, with openid-client's checks. */
async function signIn(account: string, jar?: Map<string, string>, extra = {}) {
  const secrets = {
    pkceCodeVerifier: oidc.randomPKCECodeVerifier(),
    expectedState: oidc.randomState(),
    expectedNonce: oidc.randomNonce(),
  }
  const url = oidc.buildAuthorizationUrl(configuration, {
    redirect_uri: CALLBACK,
    scope: 'openid profile email',
    state: secrets.expectedState,
    nonce: secrets.expectedNonce,
    code_challenge: await oidc.calculatePKCECodeChallenge(secrets.pkceCodeVerifier),
    code_challenge_method: 'S256',
    ...extra,
  })
  const back = await signInAtProvider(url.href, account, jar)
  return oidc.authorizationCodeGrant(configuration, back, { ...secrets, idTokenExpected: true })
}

test('somebody signs in and the ID token says name, e-mail, roles and when', async () => {
  const tokens = await signIn('north-bedside')
  expect(tokens.claims()).toMatchObject({
    iss: idp.issuer,
    sub: 'north-bedside',
    name: 'Coordinator, bedside, North ward',
    email: 'north-bedside@hospital.example',
    roles: ['coordinator'],
    auth_time: expect.any(Number),
  })
})

test('every account has one role, and names and subjects are unlike each other', () => {
  expect(PEOPLE.every((person) => person.roles.length === 1)).toBe(true)
  expect(new Set(PEOPLE.map((person) => person.subject)).size).toBe(PEOPLE.length)
  expect(new Set(PEOPLE.map((person) => person.name)).size).toBe(PEOPLE.length)
})

test('without a code challenge the provider refuses', async () => {
  const url = oidc.buildAuthorizationUrl(configuration, {
    redirect_uri: CALLBACK,
    scope: 'openid',
    state: 'any-state-will-do',
  })
  const back = await signInAtProvider(url.href, 'north-bedside')
  expect(back.searchParams.get('error')).toBe('invalid_request')
  expect(back.searchParams.get('error_description')).toMatch(/PKCE/)
})

test('an account that does not exist is said to be missing', async () => {
  await expect(signIn('nobody-of-that-name')).rejects.toThrow(/There is no account with that user/)
})

test('signing in again shows the page although somebody is signed in, and may be somebody else', async () => {
  const jar = new Map<string, string>()
  const first = await signIn('north-lead', jar)
  const second = await signIn('south-lead', jar, { prompt: 'login', max_age: '0' })
  expect(first.claims()?.sub).toBe('north-lead')
  expect(second.claims()?.sub).toBe('south-lead')
})

test('who is signed in comes through without being asked, unless asked again', async () => {
  const jar = new Map<string, string>()
  await signIn('north-lead', jar)
  // The page is not shown, so the other name is never sent.
  expect((await signIn('south-lead', jar)).claims()?.sub).toBe('north-lead')
})

const REFUSALS: Record<Fault, RegExp> = {
  'wrong-issuer': /unexpected JWT "iss"/,
  'wrong-nonce': /unexpected ID Token "nonce"/,
  'wrong-audience': /unexpected JWT "aud"/,
  'bad-signature': /JWT signature verification failed/,
  'expired-token': /unexpected JWT "exp"/,
  'wrong-response-issuer': /unexpected "iss" \(issuer\) response parameter/,
}

test.each(FAULTS)(
  'with the fault %s the client library refuses for just that reason',
  async (fault) => {
    idp.setFault(fault)
    const refusal = await signIn('north-bedside').then(
      () => undefined,
      (error: Error) => error,
    )
    const reasons = [refusal?.message, (refusal?.cause as Error | undefined)?.message].join(' ')
    expect(reasons).toMatch(REFUSALS[fault])
    idp.setFault(null)
    expect((await signIn('north-bedside')).claims()?.sub).toBe('north-bedside')
  },
)

test('a fault is switched from another process by the control route, which refuses unknown ones', async () => {
  const put = (fault: unknown) =>
    fetch(`${idp.issuer}/control/fault`, {
      method: 'PUT',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ fault }),
    })
  expect((await put('no-such-fault')).status).toBe(400)
  expect((await put('wrong-nonce')).status).toBe(200)
  await expect(signIn('analyst-centre')).rejects.toThrow()
  expect((await put(null)).status).toBe(200)
  expect((await signIn('analyst-centre')).claims()?.roles).toEqual(['analyst'])
})
