import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { analyses } from '#db/schema/analyses.ts'
import { JOB_HANDLERS } from '#server/jobHandlers.ts'
import { runNextJob } from '#server/jobs/runner.ts'
import { type Api, aKey, startApi } from '../support/api.ts'
import { breathAmmonia } from '../support/breathAmmonia.ts'
import type { GivenSubject } from '../support/earlierData.ts'
import { lockedStudy } from '../support/lockedStudy.ts'

let api: Api
let ammonia: Awaited<ReturnType<typeof lockedStudy>>
beforeAll(async () => {
  api = await startApi()
  ammonia = await lockedStudy(api, breathAmmonia())
})
afterAll(() => api.stop())

const accuracy = (more: object = {}) => ({
  kind: 'accuracy',
  analyteKey: 'ammonia',
  direction: 'higher',
  sessionRule: 'first',
  cutOff: 680,
  confidence: 0.95,
  prevalence: null,
  resampling: { seed: 20, replicates: 2_000 },
  ...more,
})

describe('an analysis that draws at random', () => {
  test('is a job until it is stored, and then reads under the key that was asked for', async () => {
    const { ask, runs, analyst, study } = ammonia
    const asked = await ask(accuracy()).expect(202)
    expect(asked.body).toMatchObject({ state: 'queued', title: 'Ammonia', own: true })
    expect((await runs()).map((run: { id: string }) => run.id)).toContain(asked.body.id)
    await api.as(analyst).get(`/api/analyses/${asked.body.id}`).expect(404)
    await api.runJobs()
    const { body } = await api.as(analyst).get(`/api/analyses/${asked.body.id}`).expect(200)
    expect(body).toMatchObject({ seed: 20, parameters: { resampling: { replicates: 2_000 } } })
    expect((await runs()).map((run: { id: string }) => run.id)).not.toContain(asked.body.id)
    const events = (await api.auditEvents(study.id)).map((each) => each.event)
    expect(events.slice(-2)).toEqual(['analysis.requested', 'analysis.run'])
  })

  test('gives the same bytes for the same seed, and others for another', async () => {
    const one = await ammonia.runLong(accuracy())
    const two = await ammonia.runLong(accuracy())
    const other = await ammonia.runLong(accuracy({ resampling: { seed: 21, replicates: 2_000 } }))
    expect(two.resultHash).toBe(one.resultHash)
    expect(other.resultHash).not.toBe(one.resultHash)
    const repeated = await api
      .as(ammonia.analyst)
      .post(`/api/analyses/${one.id}/repeat`)
      .expect(200)
    expect(repeated.body).toMatchObject({ same: true, repeatedHash: one.resultHash })
  })

  test('is refused on the request’s own thread, and asked for twice it is there once', async () => {
    const refused = await ammonia.run(accuracy())
    expect([refused.status, Object.keys(refused.body.fields)]).toEqual([422, ['parameters']])
    const { body } = await ammonia.ask(accuracy()).expect(202)
    const again = await api
      .as(ammonia.analyst)
      .post(`/api/studies/${ammonia.study.id}/analysis-runs`)
      .send({
        id: body.id,
        datasetId: ammonia.datasetId,
        title: 'Ammonia',
        parameters: accuracy(),
      })
    expect([again.status, again.body.code]).toEqual([409, 'already-exists'])
    await api.runJobs()
  })

  test('stops on request and stores nothing', async () => {
    const { ask, runs, analyst, monitor } = ammonia
    const { body } = await ask(accuracy()).expect(202)
    await api.as(monitor).post(`/api/jobs/${body.jobId}/cancel`).expect(404)
    await api.as(analyst).post(`/api/jobs/${body.jobId}/cancel`).expect(200)
    await runNextJob(JOB_HANDLERS)
    const run = (await runs()).find((each: { id: string }) => each.id === body.id)
    expect(run).toMatchObject({ state: 'cancelled', failure: expect.stringContaining('Stopped') })
    await api.as(analyst).get(`/api/analyses/${body.id}`).expect(404)
  })

  test('stops in the midst of its draws too', async () => {
    const { ask, runs, analyst } = ammonia
    const resampling = { seed: 20, replicates: 20_000 }
    const { body } = await ask(accuracy({ areaInterval: 'bootstrap', resampling })).expect(202)
    const working = runNextJob(JOB_HANDLERS)
    const job = async () => (await api.as(analyst).get(`/api/jobs/${body.jobId}`)).body
    let seen = await job()
    while (seen.progressDone === 0 && seen.finishedAt === null) seen = await job()
    expect(seen).toMatchObject({ state: 'running', progressWords: 'Computing' })
    await api.as(analyst).post(`/api/jobs/${body.jobId}/cancel`).expect(200)
    await working
    const run = (await runs()).find((each: { id: string }) => each.id === body.id)
    expect(run).toMatchObject({ state: 'cancelled' })
    await api.as(analyst).get(`/api/analyses/${body.id}`).expect(404)
  })

  test('that cannot be computed ends with a sentence that says what to do', async () => {
    const apart: GivenSubject[] = Array.from({ length: 40 }, (_, at) => ({
      outcome: at < 20 ? 'present' : 'absent',
      sessions: [
        { sensor: { ammonia: at < 20 ? 900 + at : 100 + at, acetone: 50 + ((at * 7) % 13) } },
      ],
    }))
    const { ask, runs } = await lockedStudy(api, apart)
    await ask(panel()).expect(202)
    await api.runJobs()
    const [run] = await runs()
    expect(run).toMatchObject({ state: 'failed', title: null })
    expect(run.failure).toContain('Leave out the analyte that separates them')
  })

  test('with an odd seed, an analyte twice or one that is not there is refused at its field', async () => {
    const fields = async (parameters: object) =>
      Object.keys((await ammonia.ask(parameters)).body.fields)
    expect(await fields(accuracy({ resampling: { seed: -1, replicates: 2_000 } }))).toEqual([
      'parameters.resampling.seed',
    ])
    expect(await fields(panel({ analyteKeys: ['ammonia', 'ammonia'] }))).toEqual([
      'parameters.analyteKeys',
    ])
    expect(await fields(panel({ analyteKeys: ['ammonia', 'helium'] }))).toEqual([
      'parameters.analyteKeys.1',
    ])
  })
})

const panel = (more: object = {}) => ({
  kind: 'panel',
  analyteKeys: ['ammonia', 'acetone'],
  scale: 'raw',
  sessionRule: 'first',
  confidence: 0.95,
  validation: 'bootstrap',
  resampling: { seed: 1, replicates: 200 },
  ...more,
})

test('an analysis stored before there were options reads and repeats without a difference', async () => {
  const plain = accuracy({ resampling: null })
  const { body } = await ammonia.run(plain)
  const [row] = await api.fixtures.select().from(analyses).where(eq(analyses.id, body.id))
  const { kind, analyteKey, direction, sessionRule, cutOff, confidence, prevalence } =
    body.parameters
  const old = { kind, analyteKey, direction, sessionRule, cutOff, confidence, prevalence }
  const oldId = aKey()
  await api.fixtures
    .insert(analyses)
    .values({ ...row!, id: oldId, number: 1_000, parameters: old as never })
  const read = await api.as(ammonia.analyst).get(`/api/analyses/${oldId}`).expect(200)
  expect(read.body.parameters).toMatchObject({ ...old, areaInterval: 'delong', resampling: null })
  const again = await api.as(ammonia.analyst).post(`/api/analyses/${oldId}/repeat`).expect(200)
  expect(again.body).toMatchObject({ same: true, differences: [] })
})
