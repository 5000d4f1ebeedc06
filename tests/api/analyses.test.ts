import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { analyses } from '#db/schema/analyses.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { type Api, aKey, startApi } from '../support/api.ts'
import { fillStudy, type GivenSubject, lockThroughHttp, teamOf } from '../support/earlierData.ts'
import { inventedProtocol } from '../support/makers.ts'
import { hasReference, referenceRows, referenceValue } from '../support/referenceFolder.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aLockedStudy(given: GivenSubject[], protocol?: ProtocolDocument) {
  const study = await api.given.study(protocol ? { protocol } : {})
  await fillStudy(api, study, given)
  const team = await teamOf(api, study)
  const { datasetId, datasetHash } = await lockThroughHttp(api, study, team)
  const run = (parameters: object) =>
    api
      .as(team.analyst)
      .post(`/api/studies/${study.id}/analyses`)
      .send({ id: aKey(), datasetId, title: 'Ammonia', parameters })
  return { study, datasetId, datasetHash, run, ...team }
}

const accuracy = (more: object = {}) => ({
  kind: 'accuracy',
  analyteKey: 'ammonia',
  direction: 'higher',
  sessionRule: 'first',
  cutOff: 1000,
  confidence: 0.95,
  prevalence: 0.2,
  ...more,
})
const agreement = (more: object = {}) => ({
  kind: 'agreement',
  analyteKey: 'ammonia',
  sessionRule: 'first',
  confidence: 0.95,
  acceptance: null,
  ...more,
})

const one = (outcome: GivenSubject['outcome'], ...values: number[]): GivenSubject => ({
  outcome,
  sessions: values.map((ammonia) => ({ sensor: { ammonia } })),
})

/** Twelve subjects in each class, overlapping in the middle. */
const TWO_CLASSES: GivenSubject[] = [
  ...Array.from({ length: 12 }, (_, at) => one('present', 700 + 100 * at)),
  ...Array.from({ length: 12 }, (_, at) => one('absent', 200 + 100 * at)),
  one('indeterminate', 500),
  { outcome: 'present', sessions: [] },
]

type Measure = { measure: string; [field: string]: unknown }
const measure = (body: { result: { atCutOff: { measures: Measure[] } } }, name: string) =>
  body.result.atCutOff.measures.find((each) => each.measure === name)

describe('a stored accuracy analysis', () => {
  test('holds dataset, protocol version, parameters, build, seed and its result under a hash', async () => {
    const { study, run, analyst, datasetId, datasetHash } = await aLockedStudy(TWO_CLASSES)
    const { body, status } = await run(accuracy())
    expect(status).toBe(201)
    expect(body).toMatchObject({
      number: 1,
      kind: 'accuracy',
      badge: 'exploratory',
      runByName: analyst.name,
      datasetId,
      datasetHash,
      protocolVersion: 1,
      parameters: accuracy(),
      asProtocol: true,
      statisticsVersion: expect.stringMatching(/^\d+\.\d+\.\d+$/),
      seed: expect.any(Number),
      caution: { title: 'For research use only' },
      result: {
        counts: {
          subjects: 26,
          present: 12,
          absent: 12,
          leftOut: [
            { reason: 'indeterminate', subjects: 1 },
            { reason: 'noValuePresent', subjects: 1 },
          ],
        },
        plannedCutOff: 1000,
        areaWithheld: null,
      },
    })
    const [row] = await api.fixtures.select().from(analyses).where(eq(analyses.id, body.id))
    expect(sha256Hex(row!.result)).toBe(body.resultHash)
    expect(canonicalJson(JSON.parse(row!.result))).toBe(row!.result)

    const again = await api.as(analyst).get(`/api/analyses/${body.id}`).expect(200)
    expect(again.body).toEqual(body)
    const list = await api.as(analyst).get(`/api/studies/${study.id}/analyses`).expect(200)
    expect(list.body).toHaveLength(1)
    expect(list.body[0].headline.estimate).toBe(body.result.area.estimate)
    const events = await api.auditEvents(study.id)
    expect(events.at(-1)).toMatchObject({ event: 'analysis.run', recordLabel: 'no. 1' })
  })

  test('counts the two-by-two table with positive at or above the cut-off', async () => {
    const { run } = await aLockedStudy(TWO_CLASSES)
    const { body } = await run(accuracy())
    // By hand: present 700…1800, absent 200…1300, cut-off 1000.
    expect(body.result.atCutOff.table).toEqual({
      truePositives: 9,
      falsePositives: 4,
      falseNegatives: 3,
      trueNegatives: 8,
    })
    expect(measure(body, 'sensitivity')).toMatchObject({
      numerator: 9,
      denominator: 12,
      estimate: 0.75,
      method: 'Wilson',
    })
    expect(measure(body, 'positivePredictiveValueObserved')).toMatchObject({
      numerator: 9,
      denominator: 13,
    })
    // PPV at 0.2 = 0.75·0.2 / (0.75·0.2 + (4/12)·0.8)
    expect(measure(body, 'positivePredictiveValueAtPrevalence')?.estimate).toBeCloseTo(0.36, 12)
  })

  test('hides predictive values as observed where subjects were sampled by outcome, and says why', async () => {
    const { run } = await aLockedStudy(TWO_CLASSES, { ...inventedProtocol, sampling: 'byOutcome' })
    const { body } = await run(accuracy())
    expect(measure(body, 'positivePredictiveValueObserved')).toBeUndefined()
    expect(measure(body, 'negativePredictiveValueObserved')).toBeUndefined()
    expect(body.result.atCutOff.observedPredictiveValuesHidden).toContain('chosen by outcome')
    expect(measure(body, 'positivePredictiveValueAtPrevalence')).toBeDefined()
  })

  test('gives counts and no headline area with fewer than ten in a class', async () => {
    const given = [...TWO_CLASSES.slice(0, 9), ...TWO_CLASSES.slice(12)]
    const { run, study, analyst } = await aLockedStudy(given)
    const { body } = await run(accuracy())
    expect(body.result).toMatchObject({ area: null, rules: [], counts: { present: 9, absent: 12 } })
    expect(body.result.areaWithheld).toContain('there are 9 and 12')
    const list = await api.as(analyst).get(`/api/studies/${study.id}/analyses`).expect(200)
    expect(list.body[0].headline).toBeNull()
  })

  test('takes several sessions of a subject as one cluster, and gives no interval at the cut-off', async () => {
    const doubled = TWO_CLASSES.map((subject) => ({
      ...subject,
      sessions: [...subject.sessions!, ...subject.sessions!],
    }))
    const { run } = await aLockedStudy(doubled)
    const every = await run(accuracy({ sessionRule: 'every' }))
    const first = await run(accuracy())
    expect(every.body.result.area.method).toBe('Obuchowski, subjects as clusters')
    expect(every.body.result.area.estimate).toBe(first.body.result.area.estimate)
    // Every session stands twice: as clusters they tell no more than once.
    expect(every.body.result.area.standardError).toBeCloseTo(
      first.body.result.area.standardError,
      12,
    )
    expect(every.body.result.counts).toMatchObject({ present: 12, values: 48, severalSessions: 24 })
    expect(every.body.result.atCutOff.caveat).toContain('not independent')
    expect(measure(every.body, 'sensitivity')).toMatchObject({
      numerator: 18,
      lower: null,
      upper: null,
    })
  })

  test('lists every cut-off that ties under a rule', async () => {
    const given = [
      ...Array.from({ length: 10 }, () => one('present', 30)),
      ...Array.from({ length: 10 }, () => one('present', 10)),
      ...Array.from({ length: 10 }, () => one('absent', 20)),
      ...Array.from({ length: 10 }, () => one('absent', 5)),
    ]
    const { run } = await aLockedStudy(given)
    const { body } = await run(accuracy({ cutOff: 20 }))
    const youden = body.result.rules.find((each: { rule: string }) => each.rule === 'youden')
    // At or above 30: 0.5 − 0; at or above 10: 1 − 0.5.
    expect(youden.cutOffs.map((each: { threshold: number }) => each.threshold)).toEqual([30, 10])
  })

  test('is as the protocol plans only with its analyte, direction and cut-off', async () => {
    const { run } = await aLockedStudy(TWO_CLASSES)
    const answers = [
      await run(accuracy()),
      await run(accuracy({ cutOff: 1001 })),
      await run(accuracy({ direction: 'lower' })),
    ]
    expect(answers.map(({ body }) => [body.asProtocol, body.badge])).toEqual([
      [true, 'exploratory'],
      [false, 'exploratory'],
      [false, 'exploratory'],
    ])
  })
})

describe('what cannot be computed', () => {
  test('is refused with a sentence that says what to do, and nothing is stored', async () => {
    const { run, study, analyst } = await aLockedStudy([one('absent', 1), one('absent', 2)])
    const answer = await run(accuracy())
    expect([answer.status, answer.body.code]).toEqual([422, 'statistics-refused'])
    expect(answer.body.message).toContain('Nobody has the reference outcome "present"')
    expect(answer.body.message).toContain('Choose another analyte')
    const pairs = await run(agreement())
    expect([pairs.status, pairs.body.code]).toEqual([422, 'statistics-refused'])
    expect(pairs.body.message).toContain('At least 3 complete pairs')
    const list = await api.as(analyst).get(`/api/studies/${study.id}/analyses`).expect(200)
    expect(list.body).toEqual([])
  })

  test('another study’s dataset, an analyte that is not there and odd numbers are refused at their fields', async () => {
    const { run, study, analyst } = await aLockedStudy(TWO_CLASSES)
    const other = await aLockedStudy([one('present', 1)])
    const foreign = await api
      .as(analyst)
      .post(`/api/studies/${study.id}/analyses`)
      .send({ id: aKey(), datasetId: other.datasetId, title: 'Ammonia', parameters: accuracy() })
    expect([foreign.status, Object.keys(foreign.body.fields)]).toEqual([422, ['datasetId']])
    const refused = async (more: object) => Object.keys((await run(accuracy(more))).body.fields)
    expect(await refused({ analyteKey: 'helium' })).toEqual(['parameters.analyteKey'])
    expect(await refused({ prevalence: 1 })).toEqual(['parameters.prevalence'])
    expect(await refused({ confidence: 95 })).toEqual(['parameters.confidence'])
    expect(await refused({ cutOff: '1000' })).toEqual(['parameters.cutOff'])
    const limits = await run(agreement({ acceptance: { lower: 5, upper: 5 } }))
    expect(Object.keys(limits.body.fields)).toEqual(['parameters.acceptance.upper'])
  })
})

test('running it again gives the same digits and says so; a stored result that differs is pointed out', async () => {
  const { run, study, analyst, monitor } = await aLockedStudy(TWO_CLASSES)
  const { body } = await run(accuracy())
  const repeat = () => api.as(analyst).post(`/api/analyses/${body.id}/repeat`)
  expect((await repeat().expect(200)).body).toMatchObject({
    same: true,
    storedHash: body.resultHash,
    repeatedHash: body.resultHash,
    differences: [],
  })
  const events = await api.auditEvents(study.id)
  expect(events.at(-1)).toMatchObject({ event: 'analysis.repeated', recordLabel: 'no. 1' })
  await api.as(monitor).post(`/api/analyses/${body.id}/repeat`).expect(403)

  // As an earlier build might have stored it.
  const [row] = await api.fixtures.select().from(analyses).where(eq(analyses.id, body.id))
  const old = JSON.parse(row!.result)
  old.area.lower = 0.5
  const oldId = aKey()
  await api.fixtures.insert(analyses).values({
    ...row!,
    id: oldId,
    number: 2,
    statisticsVersion: '0.9.0',
    result: canonicalJson(old),
  })
  const differs = await api.as(analyst).post(`/api/analyses/${oldId}/repeat`).expect(200)
  expect(differs.body).toMatchObject({
    same: false,
    storedStatisticsVersion: '0.9.0',
    differences: [{ path: 'area.lower', stored: '0.5' }],
  })
})

/** Peak expiratory flow by two meters, first readings, L/min: Bland & Altman 1986, Lancet i:307, table 1. */
const WRIGHT = [494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427]
const MINI = [512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451]
const METERS: GivenSubject[] = WRIGHT.map((wright, at) => ({
  sessions: [{ sensor: { ammonia: wright }, reference: { ammonia: MINI[at]! } }],
}))

describe('agreement', () => {
  test('of the published meters has the published bias and SD, and R’s intervals', async () => {
    const { run } = await aLockedStudy([...METERS, { sessions: [{ sensor: { ammonia: 1 } }] }])
    const { body } = await run(agreement())
    const { bias, sd, lowerLimit, upperLimit, counts } = body.result
    // Bland & Altman 1986: mean difference −2.1, SD 38.8.
    expect([bias.estimate.toFixed(1), sd.toFixed(1)]).toEqual(['-2.1', '38.8'])
    expect(counts).toMatchObject({
      counted: 17,
      pairs: 17,
      leftOut: [{ reason: 'noReferenceValue', subjects: 1 }],
    })
    // R 4.2.2: bias ∓ z·SD; t interval of the bias; exact intervals of the limits by noncentral t.
    expect(bias.lower).toBeCloseTo(-22.048837696645165, 6)
    expect(bias.upper).toBeCloseTo(17.813543578998107, 6)
    expect(lowerLimit.estimate).toBeCloseTo(-78.09590546711172, 6)
    expect(lowerLimit.lower).toBeCloseTo(-124.16079829483958, 5)
    expect(lowerLimit.upper).toBeCloseTo(-53.094931416742156, 5)
    expect(upperLimit.upper).toBeCloseTo(119.92550417719251, 5)
    expect(body.headline).toMatchObject({ estimate: bias.estimate, unit: '[ppb]' })
  })

  test('is judged against the acceptance limits: limits and intervals within, not shown, beyond', async () => {
    const { run } = await aLockedStudy(METERS)
    const verdict = async (width: number) => {
      const { body } = await run(agreement({ acceptance: { lower: -width, upper: width } }))
      return [body.result.acceptance.verdict, body.asProtocol]
    }
    expect(await verdict(130)).toEqual(['within', false])
    // The protocol's own limits of ±100 hold the limits of agreement, but not their intervals.
    expect(await verdict(100)).toEqual(['notShown', true])
    expect(await verdict(70)).toEqual(['beyond', false])
  })

  test('by the mean of a subject’s sessions says what such limits mean', async () => {
    const [first, ...rest] = METERS
    const twice = { sessions: [...first!.sessions!, ...first!.sessions!] }
    const { run } = await aLockedStudy([twice, ...rest])
    const mean = await run(agreement({ sessionRule: 'mean' }))
    expect(mean.body.result.caveats[0]).toContain('for such averages')
  })
})

type LimitsReference = {
  exact_noncentral_t: { lower_limit_ci95: object; upper_limit_ci95: object }
}

describe('published and public data sets give what R gave', () => {
  const asah = 'reference/data/asah.csv'
  test.skipIf(!hasReference(asah))(
    's100b in 113 patients: area 0.731 (0.630 to 0.833) by DeLong, Youden at 0.22 [skipped where the data set is absent]',
    async () => {
      const given = referenceRows(asah).map((row) =>
        one(row.label === '1' ? 'present' : 'absent', Number(row.s100b)),
      )
      const { run } = await aLockedStudy(given)
      const { body } = await run(accuracy({ cutOff: 0.22 }))
      const { area, rules, counts } = body.result
      expect(counts).toMatchObject({ present: 41, absent: 72, leftOut: [] })
      expect([area.estimate, area.lower, area.upper].map((x: number) => x.toFixed(3))).toEqual([
        '0.731',
        '0.630',
        '0.833',
      ])
      expect(area.method).toBe('DeLong')
      const results = 'reference/results/roc-asah.json'
      expect(area.estimate).toBeCloseTo(referenceValue<number>(results, 's100b', 'auc'), 12)
      const chosen = (rule: string) =>
        rules
          .find((each: { rule: string }) => each.rule === rule)
          .cutOffs.map((each: { threshold: number }) => each.threshold)
      expect(chosen('youden')).toEqual([0.22])
      expect(chosen('closestToCorner')).toEqual([0.22])
      expect(chosen('sensitivityAtLeast')[0]).toBe(0.08)
      expect(chosen('specificityAtLeast')[0]).toBe(0.44)
      expect(body.result.atCutOff.table).toEqual({
        truePositives: 26,
        falsePositives: 14,
        falseNegatives: 15,
        trueNegatives: 58,
      })
      expect(measure(body, 'sensitivity')?.lower).toBeCloseTo(0.4812070108791201, 9)
      expect(measure(body, 'likelihoodRatioPositive')?.upper).toBeCloseTo(5.510327617550046, 9)
      expect(measure(body, 'diagnosticOddsRatio')?.lower).toBeCloseTo(3.03013338037303, 9)
    },
  )

  const ammonia = 'reference/data/breath-ammonia.csv'
  test.skipIf(!hasReference(ammonia))(
    'breath ammonia in 240 synthetic subjects [skipped where the data set is absent]',
    async () => {
      const given = referenceRows(ammonia).map((row) => ({
        outcome: row.label === '1' ? ('present' as const) : ('absent' as const),
        sessions: [
          {
            sensor: {
              ammonia: { value: Number(row.ammonia_ppb), belowLod: row.below_lod === '1' },
            },
          },
        ],
      }))
      const { run } = await aLockedStudy(given)
      const { body } = await run(accuracy({ cutOff: 680 }))
      const results = 'reference/results/roc-breath-ammonia.json'
      const interval = referenceValue<{ lower: number; upper: number }>(
        results,
        'ammonia_ppb',
        'auc_ci95_truncated',
      )
      const { area, counts } = body.result
      expect(area.estimate).toBeCloseTo(referenceValue<number>(results, 'ammonia_ppb', 'auc'), 12)
      expect(area.lower).toBeCloseTo(interval.lower, 9)
      expect(area.upper).toBeCloseTo(interval.upper, 9)
      expect(body.result.atCutOff.table).toMatchObject({ truePositives: 48, falsePositives: 36 })
      expect(counts.belowLod).toBe(
        referenceRows(ammonia).filter((row) => row.below_lod === '1').length,
      )
    },
  )

  const pefr = 'reference/results/agreement-pefr.json'
  test.skipIf(!hasReference(pefr))(
    'peak flow meters: exact intervals of both limits [skipped where the results are absent]',
    async () => {
      const { run } = await aLockedStudy(METERS)
      const { body } = await run(agreement())
      const { exact_noncentral_t: exact } = referenceValue<LimitsReference>(
        pefr,
        'wright_1 - mini_1',
        'limits_of_agreement',
      )
      const round = (limits: object) =>
        Object.fromEntries(
          Object.entries(limits).map(([end, value]) => [end, Number(value).toFixed(5)]),
        )
      const { lower, upper } = body.result.lowerLimit
      expect(round({ lower, upper })).toEqual(round(exact.lower_limit_ci95))
      const above = body.result.upperLimit
      expect(round({ lower: above.lower, upper: above.upper })).toEqual(
        round(exact.upper_limit_ci95),
      )
    },
  )

  const survey = 'real/exhaled-no-survey.csv'
  test.skipIf(!hasReference(survey))(
    'exhaled nitric oxide of 17,978 people against asthma: 0.583 (0.567 to 0.599), within a second [skipped where the survey is absent]',
    async () => {
      const given = referenceRows(survey).map((row) =>
        one(
          row.current_asthma === '1' ? 'present' : row.current_asthma === '0' ? 'absent' : null,
          Number(row.exhaled_no_ppb),
        ),
      )
      const { run } = await aLockedStudy(given)
      const startedAt = performance.now()
      const { body } = await run(accuracy({ cutOff: 22 }))
      const milliseconds = performance.now() - startedAt
      console.info(`17,978 subjects analysed and stored in ${milliseconds.toFixed(0)} ms`)
      const { area, counts, atCutOff } = body.result
      expect(counts).toMatchObject({
        subjects: 17_978,
        present: 1_579,
        absent: 15_173,
        leftOut: [{ reason: 'noOutcome', subjects: 1_226 }],
      })
      // R 4.2.2 with pROC 1.18.0: 0.58276 (0.56651 to 0.59901).
      expect([area.estimate, area.lower, area.upper].map((x: number) => x.toFixed(5))).toEqual([
        '0.58276',
        '0.56651',
        '0.59901',
      ])
      expect(atCutOff.measures[0].estimate).toBeCloseTo(0.37555, 5)
      expect(atCutOff.measures[1].estimate).toBeCloseTo(0.77954, 5)
      expect(milliseconds).toBeLessThan(5_000)
    },
    120_000,
  )
})
