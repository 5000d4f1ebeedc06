import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aLead(options: { locked?: boolean } = {}) {
  const study = await api.given.study(options)
  const lead = api.as(await api.given.member(study, { role: 'coordinator', duty: 'studyLead' }))
  const list = async () => (await lead.get(`/api/studies/${study.id}/sites`)).body
  return { study, lead, list, path: `/api/studies/${study.id}/sites` }
}
const aSite = { name: 'Harbour hospital', prefix: 'H7', plannedSubjects: 30 }

describe('adding a site', () => {
  test('shows it in the list with no subjects and leaves one audit event', async () => {
    const { study, lead, list, path } = await aLead()
    const answer = await lead.post(path).send(aSite)
    expect(answer.status).toBe(201)
    expect(answer.body).toMatchObject({ ...aSite, subjectCount: 0, version: 1 })
    expect((await list()).map((each: { name: string }) => each.name)).toEqual([
      'Harbour hospital',
      'North ward',
      'South clinic',
    ])
    expect((await api.auditEvents(study.id)).map((each) => each.event)).toEqual(['site.added'])
  })

  for (const [what, changes, field, status] of [
    ['a prefix that another site has', { prefix: 'N04' }, 'prefix', 409],
    ['a name that another site has', { name: 'north WARD' }, 'name', 409],
    ['a prefix with the letter O', { prefix: 'NO4' }, 'prefix', 422],
    ['a plan of no subjects', { plannedSubjects: 0 }, 'plannedSubjects', 422],
    ['a blank name', { name: '  ' }, 'name', 422],
  ] as const)
    test(`with ${what} is refused at ${field} and stores nothing`, async () => {
      const { study, lead, list, path } = await aLead()
      const answer = await lead.post(path).send({ ...aSite, ...changes })
      expect(answer.status).toBe(status)
      expect(answer.body.fields).toHaveProperty(field)
      expect(await list()).toHaveLength(2)
      expect(await api.auditEvents(study.id)).toEqual([])
    })

  test('to locked data is refused and records nothing', async () => {
    const { study, lead, list, path } = await aLead({ locked: true })
    expect((await lead.post(path).send(aSite)).status).toBe(423)
    expect(await list()).toHaveLength(2)
    expect(await api.auditEvents(study.id)).toEqual([])
  })
})

describe('correcting a site', () => {
  const values = { name: 'North ward, level 4', plannedSubjects: 80 }

  test('keeps the reason and which fields changed, and leaves the prefix alone', async () => {
    const { study, lead } = await aLead()
    const answer = await lead
      .patch(`/api/sites/${study.north.id}`)
      .send({ ...values, version: 1, reasonForChange: 'The ward moved', prefix: 'X99' })
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({ ...values, prefix: 'N04', version: 2 })
    const events = await api.auditEvents(study.id)
    expect(events).toMatchObject([{ event: 'site.corrected', reason: 'The ward moved' }])
    expect(events[0]?.digests.map((each) => each.field).sort()).toEqual(['name', 'plannedSubjects'])
  })

  test('on top of another correction is refused and the other one stays', async () => {
    const { study, lead, list } = await aLead()
    const path = `/api/sites/${study.north.id}`
    const first = { ...values, version: 1, reasonForChange: 'The ward moved' }
    await lead.patch(path).send(first).expect(200)
    const late = await lead.patch(path).send({ ...first, name: 'Somewhere else' })
    expect(late.status).toBe(409)
    expect(late.body).toMatchObject({ code: 'changed-meanwhile', more: { version: 2 } })
    expect((await list())[0].name).toBe('North ward, level 4')
    expect(await api.auditEvents(study.id)).toHaveLength(1)
  })

  test('to the name of another site is refused at the name', async () => {
    const { study, lead } = await aLead()
    const answer = await lead
      .patch(`/api/sites/${study.north.id}`)
      .send({ ...values, name: 'South clinic', version: 1, reasonForChange: 'Typing mistake' })
    expect(answer.status).toBe(409)
    expect(answer.body.fields).toHaveProperty('name')
  })

  test('of another study is as if it did not exist', async () => {
    const { lead } = await aLead()
    const other = await api.given.study()
    const body = { ...values, version: 1, reasonForChange: 'Typing mistake' }
    const foreign = await lead.patch(`/api/sites/${other.north.id}`).send(body)
    const missing = await lead.patch(`/api/sites/${aKey()}`).send(body)
    expect([foreign.status, missing.status]).toEqual([404, 404])
    expect(await api.auditEvents(other.id)).toEqual([])
  })
})
