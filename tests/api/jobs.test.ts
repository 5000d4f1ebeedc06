import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { jobs } from '#db/schema/jobs.ts'
import { claimJob, finishJob, reportProgress } from '#server/jobs/queue.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aQueuedJob() {
  const study = await api.given.study()
  const analyst = await api.given.member(study, { role: 'analyst' })
  const id = aKey()
  await api.fixtures.insert(jobs).values({
    id,
    studyId: study.id,
    kind: 'report.write',
    state: 'queued',
    recordId: aKey(),
    payload: { actor: { personId: analyst.id } },
    startedBy: analyst.id,
    queuedAt: new Date(),
  })
  return { id, study, analyst }
}

const jobRow = async (id: string) =>
  (await api.fixtures.select().from(jobs).where(eq(jobs.id, id)))[0]!

describe('the queue', () => {
  test('gives each job to one worker, however many ask at once', async () => {
    const queued = [await aQueuedJob(), await aQueuedJob(), await aQueuedJob()]
    const claimed: string[] = []
    // A worker may find the others' rows locked and come away empty; it asks again.
    for (let round = 0; round < 10 && claimed.length < queued.length; round++) {
      const answers = await Promise.all(Array.from({ length: 8 }, () => claimJob()))
      claimed.push(...answers.flatMap((job) => (job ? [job.id] : [])))
    }
    expect(claimed.sort()).toEqual(queued.map((job) => job.id).sort())
    for (const { id } of queued) await finishJob(id, { state: 'done' })
  })

  test('gives a job to another worker when the first has said nothing for too long, and gives up at last', async () => {
    const { id } = await aQueuedJob()
    for (let attempt = 1; attempt <= 3; attempt++) {
      expect((await claimJob())?.id).toBe(id)
      expect(await claimJob()).toBeUndefined()
      await api.fixtures
        .update(jobs)
        .set({ heldUntil: new Date(Date.now() - 1000) })
        .where(eq(jobs.id, id))
    }
    expect(await claimJob()).toBeUndefined()
    expect(await jobRow(id)).toMatchObject({ state: 'failed' })
  })

  test('keeps no word of the person once a job has ended', async () => {
    const { id } = await aQueuedJob()
    await claimJob()
    await finishJob(id, { state: 'done' })
    expect((await jobRow(id)).payload).toEqual({})
  })
})

describe('a job seen through the API', () => {
  test('shows its progress to the person who started it', async () => {
    const { id, analyst } = await aQueuedJob()
    await claimJob()
    await reportProgress(id, { done: 40, total: 100, words: '40 of 100 rows' })
    const { body } = await api.as(analyst).get(`/api/jobs/${id}`)
    expect(body).toMatchObject({
      state: 'running',
      progressDone: 40,
      progressTotal: 100,
      progressWords: '40 of 100 rows',
    })
    await finishJob(id, { state: 'done' })
  })

  test('is as if it did not exist for a colleague', async () => {
    const { id, study } = await aQueuedJob()
    const colleague = await api.given.member(study, { role: 'analyst' })
    expect((await api.as(colleague).get(`/api/jobs/${id}`)).status).toBe(404)
    expect((await api.as(colleague).post(`/api/jobs/${id}/cancel`).send({})).status).toBe(404)
    await claimJob()
    await finishJob(id, { state: 'done' })
  })

  test('hears of a request to stop at its next word on progress, and the request is in the trail', async () => {
    const { id, study, analyst } = await aQueuedJob()
    await claimJob()
    expect(await reportProgress(id, { done: 1, total: 2, words: 'half' })).toBe(false)
    await api.as(analyst).post(`/api/jobs/${id}/cancel`).send({}).expect(200)
    expect(await reportProgress(id, { done: 2, total: 2, words: 'all' })).toBe(true)
    expect((await api.auditEvents(study.id)).map((each) => each.event)).toEqual(['job.cancelled'])
    await finishJob(id, { state: 'cancelled' })
  })
})
