import { afterAll, beforeAll, expect, test } from 'vitest'
import { type Api, aKey, startApi } from '../support/api.ts'
import { breathAmmonia } from '../support/breathAmmonia.ts'
import { lockedStudy } from '../support/lockedStudy.ts'
import { inOneLine, pdfPages } from '../support/pdfText.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const common = { sessionRule: 'first', confidence: 0.95 }
const resampling = { seed: 20, replicates: 2_000 }

test('the closed part prints corrected cut-offs, comparisons and panels as they are stored', async () => {
  const made = await lockedStudy(api, breathAmmonia())
  const accuracy = await made.runLong({
    ...common,
    kind: 'accuracy',
    analyteKey: 'ammonia',
    direction: 'higher',
    cutOff: 680,
    prevalence: null,
    resampling,
    partialArea: { from: 0.9, to: 1 },
    troubledResults: { zone: { lower: 600, upper: 700 } },
    subgroups: ['sex'],
    floors: { sensitivity: 0.8, specificity: null, area: null },
  })
  const markers = ['ammonia', 'acetone'].map((analyteKey) => ({ analyteKey, direction: 'higher' }))
  const comparison = await made.runLong({
    ...common,
    kind: 'comparison',
    compare: { design: 'paired', markers, adjust: false, permutations: resampling },
  })
  const panel = await made.runLong({
    ...common,
    kind: 'panel',
    analyteKeys: ['ammonia', 'acetone'],
    scale: 'log',
    validation: 'bootstrap',
    resampling: { seed: 20, replicates: 200 },
  })
  const asked = await api
    .as(made.analyst)
    .post(`/api/studies/${made.study.id}/reports`)
    .send({
      id: aKey(),
      title: 'All kinds',
      datasetId: made.datasetId,
      analysisIds: [accuracy.id, comparison.id, panel.id],
    })
    .expect(202)
  await api.runJobs()
  const file = await api
    .as(made.monitor)
    .get(`/api/reports/${asked.body.id}/closed.pdf`)
    .expect(200)
  const text = inOneLine(pdfPages(file.body))
  const youden = accuracy.result.corrections.rules[0].corrected
  expect(text).toContain(`corrected ${youden.sensitivity.toFixed(3)}`)
  expect(text).toContain('2,000 samples, seed 20')
  expect(text).toContain('Success criterion not met')
  expect(text).toContain('Sensor results from 600 to 700 ppb')
  expect(text).toContain('Counted as positive')
  expect(text).toContain('More on the area')
  expect(text).toContain('Ammonia less')
  // R 4.2.2: difference 0.081, z 2.05.
  expect(text).toContain('0.081')
  expect(text).toContain('z = 2.05')
  expect(text).toContain(`Corrected area under the curve ${panel.result.area.estimate.toFixed(3)}`)
  expect(text).toContain('ln Ammonia')
})
