import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi({ BREATHMARK_REQUESTS_PER_MINUTE: '400' })
})
afterAll(() => api.stop())

describe('every answer', () => {
  test('forbids framing, foreign scripts, sniffing and keeping', async () => {
    const { headers } = await api.nobody.get('/api/me')
    const policy = headers['content-security-policy'] ?? ''
    expect(policy).toContain("default-src 'none'")
    expect(policy).toContain("script-src 'self'")
    expect(policy).toContain("object-src 'none'")
    expect(policy).toContain("base-uri 'none'")
    expect(policy).toContain("frame-ancestors 'none'")
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['referrer-policy']).toBe('same-origin')
    expect(headers['cache-control']).toBe('no-store')
    expect(headers['x-powered-by']).toBeUndefined()
    // A counter of versions in a header would tell a blinded reader that something changed.
    expect(headers.etag).toBeUndefined()
  })

  test('to an address that does not exist says so', async () => {
    const { status, body } = await api.nobody.get('/api/no-such-thing')
    expect(status).toBe(404)
    expect(body.code).toBe('no-such-route')
    expect(body.requestId).toMatch(/^[0-9a-f-]{36}$/)
  })
})

describe('a body', () => {
  async function nurseAt() {
    const study = await api.given.study()
    const nurse = await api.given.member(study, { role: 'coordinator', site: study.north })
    return { study, client: api.as(nurse) }
  }
  const address = (study: { north: { id: string } }) => `/api/sites/${study.north.id}/subjects`

  test.each([
    ['that is not JSON', '{"id": '],
    ['that is a bare word', 'null'],
    ['that is a list', '[]'],
    ['with the wrong types', '{"id": 7, "sex": ["F"], "ageBand": {"$gt": ""}}'],
  ])('%s is refused and nothing is stored', async (_what, text) => {
    const { study, client } = await nurseAt()
    const response = await client
      .post(address(study))
      .set('content-type', 'application/json')
      .send(text)
    expect(response.status).toBe(422)
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('of more than a megabyte is refused', async () => {
    const { study, client } = await nurseAt()
    const response = await client.post(address(study)).send({ id: 'x'.repeat(1_100_000) })
    expect(response.status).toBe(413)
    expect(response.body.code).toBe('too-large')
  })

  test('nested ten thousand deep is refused without harm', async () => {
    const { study, client } = await nurseAt()
    const deep = `${'['.repeat(10_000)}${']'.repeat(10_000)}`
    const response = await client
      .post(address(study))
      .set('content-type', 'application/json')
      .send(deep)
    expect(response.status).toBe(422)
  })

  test('with fields that nobody asked for stores none of them', async () => {
    const { study, client } = await nurseAt()
    const response = await client.post(address(study)).send({
      id: aKey(),
      sex: 'F',
      ageBand: '50-54',
      code: 'N04-0000-0',
      siteId: study.south.id,
      studyId: aKey(),
    })
    expect(response.status).toBe(201)
    expect(response.body.siteName).toBe('North ward')
    expect(response.body.code).not.toBe('N04-0000-0')
  })

  test('in a charset that is not known is refused', async () => {
    const { study, client } = await nurseAt()
    const response = await client
      .post(address(study))
      .set('content-type', 'application/json; charset=utf-99')
      .send('{}')
    expect(response.status).toBe(415)
  })
})

test('an upload by nobody is refused before its file is read', async () => {
  const study = await api.given.study()
  // Were the file read first, its size would be what is wrong with it.
  const tooLarge = Buffer.alloc(51_000_000)
  const { status, body } = await api.nobody
    .post(`/api/studies/${study.id}/imports`)
    .attach('file', tooLarge, 'data.csv')
  expect(status).toBe(401)
  expect(body.code).toBe('not-signed-in')
})

test('a page that somebody else opened writes nothing under another name', async () => {
  const study = await api.given.study()
  const nurse = await api.given.member(study, { role: 'coordinator', site: study.north })
  const post = (person: string) =>
    api
      .as(nurse)
      .post(`/api/sites/${study.north.id}/subjects`)
      .set('x-breathmark-person', person)
      .send({ id: aKey(), sex: 'F', ageBand: '50-54' })
  const refused = await post(aKey())
  expect(refused.status).toBe(409)
  expect(refused.body.code).toBe('somebody-else')
  expect(await api.auditEvents(study.id)).toEqual([])
  expect((await post(nurse.id)).status).toBe(201)
})

test('an address with a broken escape answers 404 and not a fault', async () => {
  const person = await api.given.person()
  const { status } = await api.as(person).get('/api/subjects/%E0%A4%A')
  expect(status).toBe(404)
})

test('a flood from one address is refused with the time to wait, and others would not be', async () => {
  const flood = await Promise.all(Array.from({ length: 450 }, () => api.nobody.get('/api/me')))
  const refused = flood.filter((each) => each.status === 429)
  expect(refused.length).toBeGreaterThan(0)
  expect(refused[0]?.headers['retry-after']).toBe('10')
  expect(refused[0]?.body.code).toBe('too-many')
  expect(flood.filter((each) => each.status === 401).length).toBeLessThanOrEqual(400)
})
