import { createServer, type Server } from 'node:http'
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest'
import { freePort } from '#db/ports.ts'
import { HttpBrowser } from '#server/local/HttpBrowser.ts'
import { FAULTS } from '../../fake-idp/faults.ts'
import { type FakeIdp, startFakeIdp } from '../../fake-idp/server.ts'
import { type Api, startApi } from '../support/api.ts'

let idp: FakeIdp
let api: Api
let server: Server
let productUrl: string
const clientSecret = 'a-secret-for-this-test-alone'

beforeAll(async () => {
  const port = await freePort()
  productUrl = `http://127.0.0.1:${port}`
  idp = await startFakeIdp({
    port: await freePort(),
    clientId: 'breathmark',
    clientSecret,
    redirectUris: [`${productUrl}/auth/callback`],
    postLogoutRedirectUris: [`${productUrl}/`],
  })
  api = await startApi({
    BREATHMARK_PUBLIC_URL: productUrl,
    BREATHMARK_OIDC_ISSUER: idp.issuer,
    BREATHMARK_OIDC_CLIENT_SECRET: clientSecret,
  })
  server = createServer(api.app)
  await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve))
})
afterAll(async () => {
  server.closeAllConnections()
  await new Promise((resolve) => server.close(resolve))
  await api.stop()
  await idp.stop()
})
afterEach(() => idp.setFault(null))

const newBrowser = () => new HttpBrowser(productUrl)

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
    await browser.signIn('analyst-centre', '/')
    const cookie = browser.setCookies.find((each) => each.startsWith('breathmark-login='))
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
    expect(cookie).toMatch(/Path=\//)
  })

  test('anew gives a new secret and ends the old one', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst-centre', '/')
    const before = browser.cookies()
    await browser.signIn('analyst-centre', '/')
    expect(browser.cookie('breathmark-login')).not.toBe(before.get('breathmark-login'))
    const late = newBrowser()
    late.take(before)
    expect((await late.get('/api/me')).status).toBe(401)
  })

  test('is written to the trail of the installation', async () => {
    const before = (await api.auditEvents('installation')).length
    await newBrowser().signIn('monitor-oversight', '/')
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
    expect(await newBrowser().signIn('analyst-centre', wanted)).toBe('/')
  })

  test.each(FAULTS)('is refused when the provider answers with a fault: %s', async (fault) => {
    idp.setFault(fault)
    const browser = newBrowser()
    expect(await browser.signIn('analyst-centre', '/studies/new')).toMatch(
      /^\/\?signIn=refused&request=[0-9a-f-]{36}$/,
    )
    expect((await browser.get('/api/me')).status).toBe(401)
    expect((await api.auditEvents('installation')).at(-1)?.event).toBe('login.refused')
  })

  test('is refused when the answer carries a state that this browser did not send', async () => {
    const browser = newBrowser()
    const callback = await browser.signInUpToCallback('analyst-centre')
    const forged = callback.replace(/state=[^&]+/, 'state=forged')
    expect((await browser.get(forged)).location).toMatch(/signIn=refused/)
  })

  test('is refused in another browser than the one that began it', async () => {
    const callback = await newBrowser().signInUpToCallback('analyst-centre')
    expect((await newBrowser().get(callback)).location).toMatch(/signIn=refused/)
  })

  test('is refused when the same answer comes a second time', async () => {
    const browser = newBrowser()
    const callback = await browser.signInUpToCallback('analyst-centre')
    const cookies = browser.cookies()
    expect((await browser.get(callback)).location).toBe('/')
    const replay = newBrowser()
    replay.take(cookies)
    expect((await replay.get(callback)).location).toMatch(/signIn=refused/)
  })
})

describe('signing out', () => {
  test('ends the login here and leads to the end of the provider’s own', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst-centre', '/')
    const { status, body } = await browser.post('/auth/logout')
    expect(status).toBe(200)
    expect(body.redirectTo).toContain(`${idp.issuer}/session/end`)
    expect((await browser.get('/api/me')).status).toBe(401)
  })
})

describe('a login', () => {
  test('ends by itself when nothing comes for the idle time', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst-centre', '/')
    await api.age('lastSeenAt', 31)
    expect((await browser.get('/api/me')).status).toBe(401)
  })

  test('ends at its absolute limit, however busy it is', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst-centre', '/')
    await api.age('endsAt', 601)
    expect((await browser.get('/api/me')).status).toBe(401)
  })

  test('of somebody who was disabled opens nothing any more', async () => {
    const browser = newBrowser()
    await browser.signIn('analyst-second', '/')
    await api.disable('Second analyst')
    expect((await browser.get('/api/me')).status).toBe(401)
    expect(await browser.signIn('analyst-second', '/')).toMatch(/signIn=refused/)
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
    const response = await browser.send('POST', '/auth/logout', headers, {})
    expect(response.status).toBe(403)
    expect(response.body.code).toBe('cross-site')
    expect((await browser.get('/api/me')).status).toBe(200)
  })
})
