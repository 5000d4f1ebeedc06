import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { auditChains } from '#db/schema/auditChains.ts'
import { subjects } from '#db/schema/subjects.ts'
import { eventHash } from '#server/changes/auditTrail.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const WRITERS = 16
const WRITES_EACH = 12

test('sixteen writers and a lock in their midst: no write after the lock, no unexplained failure, one whole chain', async () => {
  const study = await api.given.study({ kind: 'prospective' })
  const lead = await api.given.member(study, { role: 'coordinator', duty: 'studyLead' })
  const monitor = await api.given.member(study, { role: 'monitor', duty: 'oversight' })
  void lead
  void monitor
  const nurses = await Promise.all(
    Array.from({ length: WRITERS }, () =>
      api.given.member(study, { role: 'coordinator', duty: 'bedside', site: study.north }),
    ),
  )
  const statuses: number[] = []
  let writesBeforeLock = 0
  const writing = nurses.map(async (nurse) => {
    for (let n = 0; n < WRITES_EACH; n++) {
      const response = await api
        .as(nurse)
        .post(`/api/sites/${study.north.id}/subjects`)
        .send({ id: aKey(), sex: 'F', ageBand: '50-54' })
      statuses.push(response.status)
      if (response.status === 201) writesBeforeLock += 1
    }
  })
  // Once a third has been written, the guard row is taken alone, as the approval of a lock does.
  const locking = (async () => {
    while (writesBeforeLock < (WRITERS * WRITES_EACH) / 3)
      await new Promise((resolve) => setImmediate(resolve))
    await api.given.lock(study)
    const rows = await api.fixtures
      .select({ id: subjects.id })
      .from(subjects)
      .where(eq(subjects.studyId, study.id))
    return rows.length
  })()
  const [storedAtLock] = await Promise.all([locking, ...writing])

  const stored = await api.fixtures
    .select({ id: subjects.id })
    .from(subjects)
    .where(eq(subjects.studyId, study.id))
  expect(new Set(statuses)).toEqual(new Set([201, 423]))
  expect(statuses).toHaveLength(WRITERS * WRITES_EACH)
  expect(stored).toHaveLength(storedAtLock)
  expect(stored).toHaveLength(statuses.filter((status) => status === 201).length)

  const events = await api.auditEvents(study.id)
  expect(events.map((event) => event.position)).toEqual(events.map((_, index) => index + 1))
  expect(events).toHaveLength(stored.length)
  let previous = '0'.repeat(64)
  for (const event of events) {
    expect(event.previousHash).toBe(previous)
    expect(eventHash(event)).toBe(event.hash)
    previous = event.hash
  }
  const [chain] = await api.fixtures.select().from(auditChains).where(eq(auditChains.id, study.id))
  expect(chain).toMatchObject({ count: events.length, headHash: previous })
})
