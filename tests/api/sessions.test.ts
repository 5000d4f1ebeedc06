import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

type Study = Awaited<ReturnType<Api['given']['study']>>

async function aSession(study: Study, site: Study['north'], number = 1, subjectId?: string) {
  const subject = subjectId ?? (await api.given.subject(study, site)).id
  const base = { studyId: study.id, siteId: site.id, createdAt: new Date() }
  const id = aKey()
  await api.fixtures.insert(sessions).values({ ...base, id, subjectId: subject, number })
  const value = { ...base, sessionId: id }
  await api.fixtures.insert(sessionValues).values([
    { ...value, id: aKey(), analyteId: study.ammonia.id, value: 1180.5 },
    { ...value, id: aKey(), analyteId: study.acetone.id, value: 0.1, belowLod: true },
  ])
  return { id, subjectId: subject }
}
const pathOf = (study: Study) => `/api/studies/${study.id}/sessions`

describe('the list of sessions', () => {
  test('carries each value as it was entered, with its mark below the limit of detection', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const made = await aSession(study, study.north)
    const { body } = await lead.get(pathOf(study))
    expect(body).toMatchObject({ total: 1, next: null })
    expect(body.items[0]).toMatchObject({
      ...made,
      number: 1,
      startedAt: null,
      siteName: 'North ward',
    })
    expect(body.items[0].values).toHaveLength(2)
    expect(body.items[0].values).toEqual(
      expect.arrayContaining([
        { analyteId: study.ammonia.id, value: 1180.5, belowLod: false },
        { analyteId: study.acetone.id, value: 0.1, belowLod: true },
      ]),
    )
  })

  test('pages by subject code and number without losing or repeating a session', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    for (let n = 0; n < 3; n++) {
      const { subjectId } = await aSession(study, study.north)
      await aSession(study, study.north, 2, subjectId)
      await aSession(study, study.north, 10, subjectId)
    }
    const seen: string[] = []
    let after: string | undefined
    do {
      const { body } = await lead.get(pathOf(study)).query({ limit: 2, ...(after && { after }) })
      expect(body.total).toBe(9)
      seen.push(
        ...body.items.map(
          (each: { subjectCode: string; number: number }) =>
            `${each.subjectCode} ${String(each.number).padStart(2, '0')}`,
        ),
      )
      after = body.next ?? undefined
    } while (after)
    expect(seen).toHaveLength(9)
    expect(seen).toEqual([...new Set(seen)].sort())
  })

  test('narrows to a subject, a site and the beginning of a code', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const north = await aSession(study, study.north)
    await aSession(study, study.south)
    const totals = async (query: Record<string, string>) =>
      (await lead.get(pathOf(study)).query(query)).body.total
    expect(await totals({})).toBe(2)
    expect(await totals({ subjectId: north.subjectId })).toBe(1)
    expect(await totals({ siteId: study.south.id })).toBe(1)
    expect(await totals({ code: 'n02' })).toBe(1)
  })

  test('refuses a page key that is none, at its field', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const answer = await lead.get(pathOf(study)).query({ after: 'nonsense' })
    expect(answer.status).toBe(422)
    expect(answer.body.fields).toHaveProperty('after')
  })

  test('shows a coordinator of one site nothing of another, not even by asking for it', async () => {
    const study = await api.given.study()
    const nurse = api.as(await api.given.member(study, { role: 'coordinator', site: study.north }))
    const south = await aSession(study, study.south)
    for (const query of [{}, { siteId: study.south.id }, { subjectId: south.subjectId }]) {
      const { body } = await nurse.get(pathOf(study)).query(query)
      expect(body).toMatchObject({ items: [], total: 0 })
    }
  })

  test('stays shut in a prospective study for whoever must not know sensor values', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    await aSession(study, study.north)
    for (const [role, duty, site, status] of [
      ['coordinator', 'bedside', study.north, 200],
      ['monitor', 'verifyIndex', null, 200],
      ['coordinator', 'reference', study.north, 403],
      ['coordinator', 'studyLead', null, 403],
      ['monitor', 'oversight', null, 403],
      ['analyst', null, null, 403],
    ] as const) {
      const who = await api.given.member(study, { role, duty, site })
      const answer = await api.as(who).get(pathOf(study))
      expect([duty, answer.status]).toEqual([duty, status])
      if (status === 403) expect(answer.text).not.toContain('1180.5')
    }
  })

  test('of a foreign study is as if the study did not exist', async () => {
    const study = await api.given.study()
    const stranger = api.as(await api.given.person())
    expect((await stranger.get(pathOf(study))).status).toBe(404)
  })
})
