import { and, eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { members } from '#db/schema/members.ts'
import { people } from '#db/schema/people.ts'
import type { StudyKind } from '#shared/policy/people.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aTeam(kind: StudyKind = 'earlierData') {
  const study = await api.given.study({ kind })
  const leadLine = await api.given.memberLine(study, { role: 'coordinator', duty: 'studyLead' })
  const lead = api.as(leadLine.person)
  const add = (line: Record<string, unknown>) =>
    lead
      .post(`/api/studies/${study.id}/members`)
      .send({ id: aKey(), role: 'coordinator', duty: null, siteId: null, ...line })
  const linesOf = (person: { id: string }) =>
    api.fixtures
      .select()
      .from(members)
      .where(and(eq(members.studyId, study.id), eq(members.personId, person.id)))
  return { study, leadLine, lead, add, linesOf }
}

describe('adding somebody to the team', () => {
  test('of a study of earlier data takes a role alone, opens the study and leaves one audit event', async () => {
    const { study, add } = await aTeam()
    const monitor = await api.given.person({ name: 'Invented monitor', roles: ['monitor'] })
    await api.as(monitor).get(`/api/studies/${study.id}`).expect(404)
    const answer = await add({ personId: monitor.id, role: 'monitor' })
    expect(answer.status).toBe(201)
    expect(answer.body).toMatchObject({
      personName: 'Invented monitor',
      role: 'monitor',
      duty: null,
      siteName: null,
      endsAt: null,
    })
    await api.as(monitor).get(`/api/studies/${study.id}`).expect(200)
    expect((await api.auditEvents(study.id)).map((each) => each.event)).toEqual(['member.added'])
  })

  test('with a site opens the data of that site alone', async () => {
    const { study, add } = await aTeam()
    await api.given.subject(study, study.north)
    await api.given.subject(study, study.south)
    const nurse = await api.given.person({ roles: ['coordinator'] })
    await add({ personId: nurse.id, siteId: study.north.id }).expect(201)
    const { body } = await api.as(nurse).get(`/api/studies/${study.id}/subjects`)
    expect(body.total).toBe(1)
  })

  test('as oneself is refused', async () => {
    const { study, add, leadLine } = await aTeam()
    const answer = await add({ personId: leadLine.person.id, siteId: study.north.id })
    expect(answer.status).toBe(403)
    expect(answer.body.code).toBe('own-membership')
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('with a role that the identity provider does not vouch for is refused at the role', async () => {
    const { study, add, linesOf } = await aTeam()
    const analyst = await api.given.person({ roles: ['analyst'] })
    const answer = await add({ personId: analyst.id, role: 'monitor' })
    expect(answer.status).toBe(422)
    expect(answer.body.fields).toHaveProperty('role')
    expect(await linesOf(analyst)).toEqual([])
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('whom nobody knows, or who was shut out, is refused at the person', async () => {
    const { study, add } = await aTeam()
    const shutOut = await api.given.person({ roles: ['coordinator'] })
    await api.fixtures.update(people).set({ disabled: true }).where(eq(people.id, shutOut.id))
    for (const personId of [aKey(), shutOut.id]) {
      const answer = await add({ personId })
      expect(answer.status).toBe(422)
      expect(answer.body.fields).toHaveProperty('personId')
    }
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('under a second role is refused, even after the first has ended', async () => {
    const { study, add } = await aTeam()
    const person = await api.given.person()
    const line = await api.given.memberLine(study, { role: 'analyst', person })
    await api.given.endLine(line)
    const answer = await add({ personId: person.id, role: 'monitor' })
    expect(answer.status).toBe(422)
    expect(answer.body.fields.role).toContain('one role in a study, ever')
    const back = await add({ personId: person.id, role: 'analyst' })
    expect(back.status).toBe(201)
  })

  test('twice in one place is refused, also when both arrive at once', async () => {
    const { study, add, linesOf } = await aTeam()
    const nurse = await api.given.person({ roles: ['coordinator'] })
    const place = { personId: nurse.id, siteId: study.north.id }
    const answers = await Promise.all([add(place), add(place)])
    expect(answers.map((each) => each.status).sort()).toEqual([201, 409])
    expect(await linesOf(nurse)).toHaveLength(1)
  })

  test('with two roles at once leaves one of them', async () => {
    const { add, linesOf } = await aTeam()
    const person = await api.given.person()
    const answers = await Promise.all([
      add({ personId: person.id, role: 'monitor' }),
      add({ personId: person.id, role: 'analyst' }),
    ])
    expect(answers.map((each) => each.status).sort()).toEqual([201, 422])
    expect(await linesOf(person)).toHaveLength(1)
  })

  test('at a site of another study is refused at the site', async () => {
    const { add } = await aTeam()
    const other = await api.given.study()
    const nurse = await api.given.person({ roles: ['coordinator'] })
    const answer = await add({ personId: nurse.id, siteId: other.north.id })
    expect(answer.status).toBe(422)
    expect(answer.body.fields).toHaveProperty('siteId')
  })

  test('with a duty is refused in a study of earlier data, without one in a prospective study', async () => {
    const earlier = await aTeam()
    const prospective = await aTeam('prospective')
    const nurse = await api.given.person({ roles: ['coordinator'] })
    const siteOf = (team: typeof earlier) => ({ siteId: team.study.north.id })
    const answers = [
      await earlier.add({ personId: nurse.id, duty: 'bedside', ...siteOf(earlier) }),
      await prospective.add({ personId: nurse.id, ...siteOf(prospective) }),
    ]
    for (const answer of answers) {
      expect(answer.status).toBe(422)
      expect(Object.keys(answer.body.fields)).toEqual(['duty'])
    }
  })

  test('is not for a coordinator of one site', async () => {
    const { study } = await aTeam()
    const nurse = await api.given.member(study, { role: 'coordinator', site: study.north })
    const other = await api.given.person()
    const answer = await api
      .as(nurse)
      .post(`/api/studies/${study.id}/members`)
      .send({ id: aKey(), personId: other.id, role: 'monitor', duty: null, siteId: null })
    expect(answer.status).toBe(403)
    expect((await api.auditEvents(study.id)).map((each) => each.event)).toEqual(['attempt.refused'])
  })
})

describe('duties of a prospective study that do not go together', () => {
  for (const [first, second, goes] of [
    ['bedside', 'reference', false],
    ['reference', 'bedside', false],
    ['bedside', 'studyLead', false],
    ['reference', 'studyLead', false],
    ['bedside', 'siteLead', true],
    ['siteLead', 'studyLead', true],
    ['verifyIndex', 'verifyReference', false],
    ['verifyIndex', 'oversight', false],
    ['verifyReference', 'oversight', false],
  ] as const)
    test(`${second} ${goes ? 'goes with' : 'is refused to somebody who carried'} ${first}`, async () => {
      const { study, add, linesOf } = await aTeam('prospective')
      const person = await api.given.person()
      const role = first.startsWith('verify') ? 'monitor' : 'coordinator'
      const siteFor = (duty: string) =>
        ['bedside', 'reference', 'siteLead'].includes(duty) ? study.north : null
      const line = await api.given.memberLine(study, {
        role,
        duty: first,
        site: siteFor(first),
        person,
      })
      // What was seen stays seen: an ended line counts.
      await api.given.endLine(line)
      const answer = await add({
        personId: person.id,
        role,
        duty: second,
        siteId: siteFor(second)?.id ?? null,
      })
      expect(answer.status).toBe(goes ? 201 : 422)
      if (!goes) expect(Object.keys(answer.body.fields)).toEqual(['duty'])
      expect(await linesOf(person)).toHaveLength(goes ? 2 : 1)
    })
})

describe('ending a place in the team', () => {
  const reason = { reasonForChange: 'Left the ward' }

  test('shuts the person out, keeps the line with when and why, and can be done once', async () => {
    const { study, lead } = await aTeam()
    const line = await api.given.memberLine(study, { role: 'monitor' })
    const answer = await lead.post(`/api/members/${line.id}/end`).send(reason)
    expect(answer.status).toBe(200)
    expect(answer.body).toMatchObject({ endReason: 'Left the ward', endsAt: expect.any(String) })
    await api.as(line.person).get(`/api/studies/${study.id}`).expect(404)
    const again = await lead.post(`/api/members/${line.id}/end`).send(reason)
    expect(again.status).toBe(409)
    const { body } = await lead.get(`/api/studies/${study.id}/members`)
    expect(body).toHaveLength(2)
    expect(await api.auditEvents(study.id)).toMatchObject([
      { event: 'member.ended', reason: 'Left the ward' },
    ])
  })

  test('that is one’s own is refused', async () => {
    const { study, lead, leadLine } = await aTeam()
    const answer = await lead.post(`/api/members/${leadLine.id}/end`).send(reason)
    expect(answer.status).toBe(403)
    expect(answer.body.code).toBe('own-membership')
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('without a reason is refused at the reason', async () => {
    const { study, lead } = await aTeam()
    const line = await api.given.memberLine(study, { role: 'monitor' })
    const answer = await lead.post(`/api/members/${line.id}/end`).send({ reasonForChange: '' })
    expect(answer.status).toBe(422)
    expect(answer.body.fields).toHaveProperty('reasonForChange')
  })

  test('of two leads by each other at once leaves one of them', async () => {
    const { study, lead, leadLine } = await aTeam()
    const second = await api.given.memberLine(study, { role: 'coordinator', duty: 'studyLead' })
    const answers = await Promise.all([
      lead.post(`/api/members/${second.id}/end`).send(reason),
      api.as(second.person).post(`/api/members/${leadLine.id}/end`).send(reason),
    ])
    const statuses = answers.map((each) => each.status)
    expect(statuses.filter((status) => status === 200)).toHaveLength(1)
    // The one who came second had lost the place: before the change, or inside it.
    expect([403, 404]).toContain(statuses.find((status) => status !== 200))
  })

  test('in another study is as if it did not exist', async () => {
    const { lead } = await aTeam()
    const other = await api.given.study()
    const line = await api.given.memberLine(other, { role: 'monitor' })
    const foreign = await lead.post(`/api/members/${line.id}/end`).send(reason)
    expect(foreign.status).toBe(404)
    expect(await api.auditEvents(other.id)).toEqual([])
  })
})

test('people to choose from are those whom the provider has vouched for and nobody shut out', async () => {
  const { study, lead } = await aTeam()
  const shutOut = await api.given.person({ name: 'Shut out' })
  const known = await api.given.person({ name: 'Known', roles: ['analyst'] })
  await api.fixtures.update(people).set({ disabled: true }).where(eq(people.id, shutOut.id))
  const { body } = await lead.get(`/api/studies/${study.id}/people`)
  expect(body).toContainEqual({ id: known.id, name: 'Known', roles: ['analyst'] })
  expect(body.map((each: { id: string }) => each.id)).not.toContain(shutOut.id)
})
