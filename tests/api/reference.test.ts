import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import type { Outcome } from '#shared/terms/outcome.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

type Study = Awaited<ReturnType<Api['given']['study']>>

/** A subject with an outcome, with values of the reference analyser, or with neither. */
async function aSubject(
  study: Study,
  options: { site?: Study['north']; outcome?: Outcome; measured?: number[] },
) {
  const site = options.site ?? study.north
  const subject = await api.given.subject(study, site)
  const base = { studyId: study.id, siteId: site.id, createdAt: new Date() }
  if (options.outcome)
    await api.fixtures.insert(referenceOutcomes).values({
      ...base,
      id: aKey(),
      subjectId: subject.id,
      outcome: options.outcome,
    })
  for (const [index, value] of (options.measured ?? []).entries()) {
    const sessionId = aKey()
    await api.fixtures
      .insert(sessions)
      .values({ ...base, id: sessionId, subjectId: subject.id, number: index + 1 })
    await api.fixtures
      .insert(referenceMeasurements)
      .values({ ...base, id: aKey(), sessionId, analyteId: study.ammonia.id, value })
  }
  return subject
}
const pathOf = (study: Study) => `/api/studies/${study.id}/reference`

describe('the list of reference values', () => {
  test('holds every subject with an outcome or a value of the analyser, and no other', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const decided = await aSubject(study, { outcome: 'present' })
    const measured = await aSubject(study, { measured: [812.25, 790] })
    await aSubject(study, {})
    const { body } = await lead.get(pathOf(study))
    expect(body.total).toBe(2)
    expect(body.items).toEqual([
      {
        subjectId: decided.id,
        subjectCode: decided.code,
        siteName: 'North ward',
        outcome: 'present',
        measurements: [],
      },
      {
        subjectId: measured.id,
        subjectCode: measured.code,
        siteName: 'North ward',
        outcome: null,
        measurements: [
          { sessionNumber: 1, analyteId: study.ammonia.id, value: 812.25 },
          { sessionNumber: 2, analyteId: study.ammonia.id, value: 790 },
        ],
      },
    ])
  })

  test('narrows to an outcome, a site and a subject, and pages by code', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const outcomes: Outcome[] = ['present', 'absent', 'absent', 'indeterminate']
    for (const outcome of outcomes) await aSubject(study, { outcome })
    const south = await aSubject(study, { site: study.south, outcome: 'absent' })
    const ask = async (query: Record<string, string | number>) =>
      (await lead.get(pathOf(study)).query(query)).body
    expect((await ask({ outcome: 'absent' })).total).toBe(3)
    expect((await ask({ siteId: study.south.id })).total).toBe(1)
    expect((await ask({ subjectId: south.id })).items).toHaveLength(1)
    const first = await ask({ limit: 3 })
    const second = await ask({ limit: 3, after: first.next })
    const codes = [...first.items, ...second.items].map((each) => each.subjectCode)
    expect(codes).toHaveLength(5)
    expect(codes).toEqual([...new Set(codes)].sort())
    expect(second.next).toBeNull()
  })

  test('shows a coordinator of one site nothing of another', async () => {
    const study = await api.given.study()
    const nurse = api.as(await api.given.member(study, { role: 'coordinator', site: study.north }))
    const south = await aSubject(study, { site: study.south, outcome: 'present' })
    for (const query of [{}, { siteId: study.south.id }, { subjectId: south.id }]) {
      const { body } = await nurse.get(pathOf(study)).query(query)
      expect(body).toMatchObject({ items: [], total: 0 })
    }
  })

  test('stays shut in a prospective study for whoever must not know outcomes', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    await aSubject(study, { outcome: 'present' })
    for (const [role, duty, site, status] of [
      ['coordinator', 'reference', study.north, 200],
      ['monitor', 'verifyReference', null, 200],
      ['coordinator', 'bedside', study.north, 403],
      ['coordinator', 'siteLead', study.north, 403],
      ['monitor', 'verifyIndex', null, 403],
      ['analyst', null, null, 403],
    ] as const) {
      const who = await api.given.member(study, { role, duty, site })
      const answer = await api.as(who).get(pathOf(study))
      expect([duty, answer.status]).toEqual([duty, status])
      if (status === 403) expect(answer.text).not.toContain('present')
    }
  })
})
