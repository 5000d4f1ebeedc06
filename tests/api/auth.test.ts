import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest'
import { freePort } from '#db/ports.ts'
import { type FakeIdp, startFakeIdp } from '../../fake-idp/server.ts'
import { type Api, startApi } from '../support/api.ts'
import { Browser } from '../support/Browser.ts'

let idp: FakeIdp
let api: Api
const clientSecret = 'a-secret-for-this-test-alone'

beforeAll(async () => {
  const port = await freePort()
  const productUrl = 'http://127.0.0.1:4173'
  idp = await startFakeIdp({ port, clientId: 'breathmark', clientSecret, productUrl })
  api = await startApi({
    BREATHMARK_OIDC_ISSUER: idp.issuer,
    BREATHMARK_OIDC_CLIENT_SECRET: clientSecret,
  })
})
afterAll(async () => {
  await api.stop()
  await idp.stop()
})
afterEach(() => idp.setFault(null))

const newBrowser = () => new Browser(api.app)

describe('signing in', () => {
  test('leads through the provider back to the page that was wanted, with the roles that it vouches for', async () => {
    const browser = newBrowser()
    const landed = await browser.signIn('north-bedside', '/studies/new')
    expect(landed).toBe('/studies/new')
    const { status, body } = await browser.get('/api/me')
    expect(status).toBe(200)
    expect(body.person).toMatchObject({
      name: 'Coordinator, bedside, North ward',
      roles: ['coordinator'],
    })
  })

  test('sets a cookie that scripts cannot read and other sites cannot use to write', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst', '/')
    const cookie = browser.setCookies.find((each) => each.startsWith('breathmark-login='))
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
    expect(cookie).toMatch(/Path=\//)
  })

  test('anew gives a new secret and ends the old one', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst', '/')
    const before = browser.cookie('breathmark-login')
    await browser.signIn('analyst', '/')
    expect(browser.cookie('breathmark-login')).not.toBe(before)
    expect((await browser.get('/api/me', { 'breathmark-login': before! })).status).toBe(401)
  })

  test('is written to the trail of the installation', async () => {
    const before = (await api.auditEvents('installation')).length
    await newBrowser().signIn('oversight', '/')
    const events = await api.auditEvents('installation')
    expect(events.slice(before).map((each) => [each.event, each.personName])).toEqual([
      ['login.started', 'Monitor, oversight'],
    ])
  })

  test.each([
    'https://elsewhere.example/',
    '//elsewhere.example/',
    '/\\elsewhere.example',
    'javascript:alert(1)',
  ])('never returns to another site: %s', async (wanted) => {
    expect(await newBrowser().signIn('analyst', wanted)).toBe('/')
  })

  test.each(['issuer', 'nonce', 'audience', 'signature', 'expired', 'noRoles'] as const)(
    'is refused when the token is wrong: %s',
    async (fault) => {
      idp.setFault(fault)
      const browser = newBrowser()
      expect(await browser.signIn('analyst', '/studies/new')).toMatch(
        /^\/\?signIn=refused&request=[0-9a-f-]{36}$/,
      )
      expect((await browser.get('/api/me')).status).toBe(401)
      expect((await api.auditEvents('installation')).at(-1)?.event).toBe('login.refused')
    },
  )

  test('is refused when the answer carries a state that this browser did not send', async () => {
    const browser = newBrowser()
    const callback = await browser.signInUpToCallback('analyst')
    const forged = callback.replace(/state=[^&]+/, 'state=forged')
    expect((await browser.follow(forged)).location).toMatch(/signIn=refused/)
  })

  test('is refused in another browser than the one that began it', async () => {
    const callback = await newBrowser().signInUpToCallback('analyst')
    expect((await newBrowser().follow(callback)).location).toMatch(/signIn=refused/)
  })

  test('is refused when the same answer comes a second time', async () => {
    const browser = newBrowser()
    const callback = await browser.signInUpToCallback('analyst')
    const cookies = browser.cookies()
    expect((await browser.follow(callback)).location).toBe('/')
    const replay = newBrowser()
    replay.take(cookies)
    expect((await replay.follow(callback)).location).toMatch(/signIn=refused/)
  })
})

describe('signing out', () => {
  test('ends the login here and leads to the end of the provider’s own', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst', '/')
    const { status, body } = await browser.post('/auth/logout')
    expect(status).toBe(200)
    expect(body.redirectTo).toContain(`${idp.issuer}/session/end`)
    expect((await browser.get('/api/me')).status).toBe(401)
  })
})

describe('a login', () => {
  test('ends by itself when nothing comes for the idle time', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst', '/')
    await api.age('lastSeenAt', 31)
    expect((await browser.get('/api/me')).status).toBe(401)
  })

  test('ends at its absolute limit, however busy it is', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst', '/')
    await api.age('endsAt', 601)
    expect((await browser.get('/api/me')).status).toBe(401)
  })

  test('of somebody who was disabled opens nothing any more', async () => {
    const browser = newBrowser()
    await browser.signIn('second-analyst', '/')
    await api.disable('Second analyst')
    expect((await browser.get('/api/me')).status).toBe(401)
    expect(await browser.signIn('second-analyst', '/')).toMatch(/signIn=refused/)
  })
})

describe('writes from another site', () => {
  test.each([
    ['a foreign origin', { origin: 'https://elsewhere.example', 'x-breathmark': '1' }],
    [
      'the browser’s word that it is another site',
      { 'sec-fetch-site': 'cross-site', 'x-breathmark': '1' },
    ],
    ['no header of ours', {}],
  ])('are refused by %s', async (_what, headers) => {
    const browser = newBrowser()
    await browser.signIn('study-lead', '/')
    const response = await browser.bare('post', '/auth/logout', headers)
    expect(response.status).toBe(403)
    expect(response.body.code).toBe('cross-site')
    expect((await browser.get('/api/me')).status).toBe(200)
  })
})
