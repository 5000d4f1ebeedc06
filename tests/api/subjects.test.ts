import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { studies } from '#db/schema/studies.ts'
import { subjects } from '#db/schema/subjects.ts'
import { isSubjectCode } from '#shared/terms/subjectCode.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function bedsideAtNorth() {
  const study = await api.given.study({ kind: 'prospective' })
  const nurse = await api.given.member(study, {
    role: 'coordinator',
    duty: 'bedside',
    site: study.north,
  })
  return { study, nurse, client: api.as(nurse) }
}

const aSubject = () => ({ id: aKey(), sex: 'F', ageBand: '50-54' })

describe('enrolling a subject', () => {
  test('gives a code of the site whose check character is right, and one audit event with each value', async () => {
    const { study, client } = await bedsideAtNorth()
    const input = aSubject()
    const response = await client.post(`/api/sites/${study.north.id}/subjects`).send(input)
    expect(response.status).toBe(201)
    expect(response.body).toMatchObject({
      ...input,
      siteName: 'North ward',
      sessionCount: 0,
      version: 1,
    })
    expect(response.body.code).toMatch(/^N04-\d{4}-/)
    expect(isSubjectCode(response.body.code)).toBe(true)

    const events = await api.auditEvents(study.id)
    expect(events).toHaveLength(1)
    expect(events[0]).toMatchObject({
      event: 'subject.enrolled',
      recordId: input.id,
      recordLabel: response.body.code,
      role: 'coordinator',
      duty: 'bedside',
      localOffset: '+01:00',
    })
    expect(events[0]?.digests.map((each) => each.field).sort()).toEqual(
      ['ageBand', 'code', 'covariates', 'enrolledAt', 'sex'].sort(),
    )
  })

  test('twice under one key answers 409 and stores it once', async () => {
    const { study, client } = await bedsideAtNorth()
    const input = aSubject()
    await client.post(`/api/sites/${study.north.id}/subjects`).send(input).expect(201)
    const again = await client.post(`/api/sites/${study.north.id}/subjects`).send(input)
    expect(again.status).toBe(409)
    expect(again.body.code).toBe('already-exists')
    expect(await api.auditEvents(study.id)).toHaveLength(1)
  })

  test('at a locked study is refused and records nothing', async () => {
    const { study, client } = await bedsideAtNorth()
    await api.given.lock(study)
    const response = await client.post(`/api/sites/${study.north.id}/subjects`).send(aSubject())
    expect(response.status).toBe(423)
    expect(response.body).toMatchObject({ code: 'locked' })
    expect(await api.auditEvents(study.id)).toEqual([])
  })

  test('at another site is as if that site did not exist', async () => {
    const { study, client } = await bedsideAtNorth()
    const foreign = await client.post(`/api/sites/${study.south.id}/subjects`).send(aSubject())
    const missing = await client.post(`/api/sites/${aKey()}/subjects`).send(aSubject())
    expect(foreign.status).toBe(404)
    const { requestId: _a, ...first } = foreign.body
    const { requestId: _b, ...second } = missing.body
    expect(first).toEqual(second)
  })

  test('with wrong entries names each field and stores nothing', async () => {
    const { study, client } = await bedsideAtNorth()
    const response = await client
      .post(`/api/sites/${study.north.id}/subjects`)
      .send({ id: 'not-a-key', sex: 'x', ageBand: 50 })
    expect(response.status).toBe(422)
    expect(Object.keys(response.body.fields).sort()).toEqual(['ageBand', 'id', 'sex'])
    expect(await api.auditEvents(study.id)).toEqual([])
  })
})

describe('correcting a subject', () => {
  test('keeps the old value beside the new one, with the reason', async () => {
    const { study, client } = await bedsideAtNorth()
    const { body } = await client.post(`/api/sites/${study.north.id}/subjects`).send(aSubject())
    const corrected = await client
      .patch(`/api/subjects/${body.id}`)
      .send({ sex: 'M', ageBand: '50-54', version: 1, reasonForChange: 'Misread on the form' })
    expect(corrected.body).toMatchObject({ sex: 'M', version: 2 })
    const events = await api.auditEvents(study.id)
    expect(events.at(-1)).toMatchObject({
      event: 'subject.corrected',
      reason: 'Misread on the form',
    })
    expect(events.at(-1)?.digests.map((each) => each.field)).toEqual(['sex'])
  })

  test('without a reason is refused at the field', async () => {
    const { study, client } = await bedsideAtNorth()
    const { body } = await client.post(`/api/sites/${study.north.id}/subjects`).send(aSubject())
    const response = await client
      .patch(`/api/subjects/${body.id}`)
      .send({ sex: 'M', ageBand: '50-54', version: 1, reasonForChange: ' ' })
    expect(response.status).toBe(422)
    expect(response.body.fields).toHaveProperty('reasonForChange')
  })

  test('on top of what somebody else changed meanwhile is refused, and the other value stays', async () => {
    const { study, client } = await bedsideAtNorth()
    const { body } = await client.post(`/api/sites/${study.north.id}/subjects`).send(aSubject())
    const change = { sex: 'M', ageBand: '50-54', version: 1, reasonForChange: 'Misread' }
    await client.patch(`/api/subjects/${body.id}`).send(change).expect(200)
    const late = await client.patch(`/api/subjects/${body.id}`).send({ ...change, sex: 'other' })
    expect(late.status).toBe(409)
    expect(late.body.code).toBe('changed-meanwhile')
    const now = await client.get(`/api/subjects/${body.id}`)
    expect(now.body.sex).toBe('M')
  })

  test('that changes nothing is refused in words, and leaves no event', async () => {
    const { study, client } = await bedsideAtNorth()
    const { body } = await client.post(`/api/sites/${study.north.id}/subjects`).send(aSubject())
    const before = await api.auditEvents(study.id)
    const { sex, ageBand } = body
    const response = await client
      .patch(`/api/subjects/${body.id}`)
      .send({ sex, ageBand, version: 1, reasonForChange: 'Misread' })
    expect(response.status).toBe(422)
    expect(response.body.message).toBe('Nothing differs from what is stored.')
    expect(await api.auditEvents(study.id)).toHaveLength(before.length)
  })
})

describe('listing subjects', () => {
  test('shows a coordinator the own site alone, in rows and in the count', async () => {
    const { study, client } = await bedsideAtNorth()
    await api.given.subject(study, study.north)
    await api.given.subject(study, study.south)
    const { body } = await client.get(`/api/studies/${study.id}/subjects`)
    expect(body.total).toBe(1)
    expect(body.items.map((each: { siteName: string }) => each.siteName)).toEqual(['North ward'])
  })

  test('pages by key in both directions without losing or repeating a row', async () => {
    const { study, client } = await bedsideAtNorth()
    const made = []
    for (let n = 0; n < 7; n++) made.push((await api.given.subject(study, study.north)).code)
    for (const [descending, expected] of [
      ['false', made.sort()],
      ['true', [...made].sort().reverse()],
    ] as const) {
      const seen: string[] = []
      let after: string | null = null
      do {
        const { body } = await client
          .get(`/api/studies/${study.id}/subjects`)
          .query({ limit: 3, order: 'enrolledAt', descending, ...(after ? { after } : {}) })
        seen.push(...body.items.map((each: { code: string }) => each.code))
        after = body.next
      } while (after)
      expect([...seen].sort()).toEqual([...expected].sort())
      expect(new Set(seen).size).toBe(7)
    }
  })

  test('takes per cent and underscore in the code filter as they are', async () => {
    const { study, client } = await bedsideAtNorth()
    await api.given.subject(study, study.north)
    const { body } = await client.get(`/api/studies/${study.id}/subjects`).query({ code: 'N%' })
    expect(body.total).toBe(0)
  })
})

describe('what a subject still lacks', () => {
  test('narrows the list to subjects without a session, or without a decided outcome', async () => {
    const study = await api.given.study()
    const lead = api.as(await api.given.member(study, { role: 'coordinator' }))
    const [whole, bare, notDone] = [
      await api.given.subject(study, study.north),
      await api.given.subject(study, study.north),
      await api.given.subject(study, study.north),
    ]
    const of = (subject: { id: string }) => ({
      id: aKey(),
      studyId: study.id,
      siteId: study.north.id,
      subjectId: subject.id,
      createdAt: new Date(),
    })
    await api.fixtures.insert(sessions).values([
      { ...of(whole), number: 1 },
      { ...of(whole), number: 2 },
      { ...of(notDone), number: 1 },
    ])
    await api.fixtures.insert(referenceOutcomes).values([
      { ...of(whole), outcome: 'absent' },
      { ...of(notDone), outcome: 'notDone' },
    ])
    const codes = async (query: Record<string, string>) => {
      const { body } = await lead.get(`/api/studies/${study.id}/subjects`).query(query)
      expect(body.total).toBe(body.items.length)
      return body.items.map((each: { code: string }) => each.code).sort()
    }
    expect(await codes({ needs: 'session' })).toEqual([bare.code])
    expect(await codes({ needs: 'outcome' })).toEqual([bare.code, notDone.code].sort())
    const { body } = await lead.get(`/api/studies/${study.id}/subjects`).query({ code: whole.code })
    expect(body.items).toMatchObject([{ sessionCount: 2, outcomeDecided: true }])
  })

  test('says that an outcome is there and never which', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    const nurse = await api.given.member(study, {
      role: 'coordinator',
      duty: 'bedside',
      site: study.north,
    })
    const subject = await api.given.subject(study, study.north)
    const read = async (outcome: 'present' | 'absent') => {
      await api.fixtures
        .insert(referenceOutcomes)
        .values({
          id: aKey(),
          studyId: study.id,
          siteId: study.north.id,
          subjectId: subject.id,
          createdAt: new Date(),
          outcome,
        })
        .onDuplicateKeyUpdate({ set: { outcome } })
      return (await api.as(nurse).get(`/api/subjects/${subject.id}`)).text
    }
    expect(await read('present')).toBe(await read('absent'))
  })

  test('hides covariates, which may hold either class, from a blinded reader', async () => {
    const study = await api.given.study({ kind: 'prospective' })
    const nurse = await api.given.member(study, {
      role: 'coordinator',
      duty: 'bedside',
      site: study.north,
    })
    const subject = await api.given.subject(study, study.north)
    await api.fixtures
      .update(subjects)
      .set({ covariates: { severity: 3 } })
      .where(eq(subjects.id, subject.id))
    const { body } = await api.as(nurse).get(`/api/subjects/${subject.id}`)
    expect(body.covariates).toEqual({})
    await api.fixtures
      .update(studies)
      .set({ releasedAt: new Date() })
      .where(eq(studies.id, study.id))
    const after = await api.as(nurse).get(`/api/subjects/${subject.id}`)
    expect(after.body.covariates).toEqual({ severity: 3 })
  })
})
