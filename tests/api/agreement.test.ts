import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type Api, aKey, startApi } from '../support/api.ts'
import { fillStudy, type GivenSubject, lockThroughHttp, teamOf } from '../support/earlierData.ts'
import { inOneLine, pdfPages } from '../support/pdfText.ts'
import { hasReference, referenceRows, referenceValue } from '../support/referenceFolder.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

async function aLockedStudy(given: GivenSubject[]) {
  const study = await api.given.study({})
  const codes = await fillStudy(api, study, given)
  const team = await teamOf(api, study)
  const { datasetId } = await lockThroughHttp(api, study, team)
  const run = (parameters: object) =>
    api
      .as(team.analyst)
      .post(`/api/studies/${study.id}/analyses`)
      .send({ id: aKey(), datasetId, title: 'Meters', parameters })
  return { study, codes, datasetId, run, ...team }
}

const agreement = (more: object = {}) => ({
  kind: 'agreement',
  analyteKey: 'ammonia',
  sessionRule: 'first',
  confidence: 0.95,
  acceptance: null,
  ...more,
})

/** Peak expiratory flow, L/min, two readings by each of two meters: Bland & Altman 1986, table 1. */
const WRIGHT_1 = [
  494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427,
]
const WRIGHT_2 = [
  490, 397, 512, 401, 470, 611, 415, 431, 638, 429, 420, 633, 275, 492, 165, 372, 421,
]
const MINI_1 = [512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451]
const MINI_2 = [525, 415, 508, 444, 500, 625, 460, 390, 642, 432, 420, 605, 227, 467, 268, 370, 443]

const session = (sensor: number, reference: number) => ({
  sensor: { ammonia: sensor },
  reference: { ammonia: reference },
})
const ONCE: GivenSubject[] = WRIGHT_1.map((wright, at) => ({
  sessions: [session(wright, MINI_1[at]!)],
}))
const TWICE: GivenSubject[] = WRIGHT_1.map((wright, at) => ({
  sessions: [session(wright, MINI_1[at]!), session(WRIGHT_2[at]!, MINI_2[at]!)],
}))

type Line = { estimate: number; lower: number; upper: number }
const numbers = ({ estimate, lower, upper }: Line) => [estimate, lower, upper]
function close(found: (number | null)[], wanted: number[], digits = 6) {
  expect(found).toHaveLength(wanted.length)
  for (const [at, value] of wanted.entries()) expect(found[at]).toBeCloseTo(value, digits)
}

describe('several sessions of a subject', () => {
  test('count with subjects as clusters: true value varies, with the limits and MOVER intervals that R gave', async () => {
    const { run } = await aLockedStudy(TWICE)
    const { body, status } = await run(agreement({ sessionRule: 'every', trueValue: 'varying' }))
    expect(status).toBe(201)
    const { bias, sd, lowerLimit, upperLimit, replicates, caveats } = body.result
    // Base R 4.2.2, Bland & Altman 2007 and Zou 2013; with two pairs each both give the same limits.
    expect(bias.estimate).toBeCloseTo(-6.029411764705882, 9)
    expect(sd).toBeCloseTo(37.62821219432537, 9)
    close(numbers(lowerLimit), [-79.77935246821447, -115.58519870761792, -58.1765457545266])
    close(numbers(upperLimit), [67.7205289388027, 46.11772222511483, 103.52637517820615])
    expect(replicates).toMatchObject({ trueValue: 'varying', subjects: 17, pairs: 34 })
    expect(replicates.withinDifferences).toBeCloseTo(Math.sqrt(626.7352941176471), 9)
    expect(body.result.limitsMethod).toBe('true value varies, MOVER (Zou)')
    expect(caveats[0]).toContain('subjects as clusters')
    expect(body.result.comparison).toBeNull()
    expect(body.result.comparisonWithheld).toContain('count subjects twice')
  })

  test('or as repeats of a true value that stays: Bland & Altman 1999, with MOVER intervals', async () => {
    const { run } = await aLockedStudy(TWICE)
    const { body } = await run(agreement({ sessionRule: 'every', trueValue: 'constant' }))
    const { bias, sd, lowerLimit, upperLimit, replicates } = body.result
    // Base R 4.2.2. Bland & Altman 1986 print within-subject SDs of 15.3 and 19.9 for the two meters.
    close(numbers(bias), [-6.029411764705882, -23.101403636223985, 11.042580106812219])
    expect(sd).toBeCloseTo(37.65477862026514, 9)
    close(numbers(lowerLimit), [-79.83142170625437, -115.23912668052103, -58.425452315407725])
    close(numbers(upperLimit), [67.7725981768426, 46.36662878599596, 103.18030315110926])
    expect(replicates.withinSensor.toFixed(1)).toBe('15.3')
    expect(replicates.withinReference.toFixed(1)).toBe('19.9')
  })

  test('are refused on a scale for which there is no such method, with what to do', async () => {
    const { run } = await aLockedStudy(TWICE)
    for (const scale of ['percent', 'regression', 'nonparametric']) {
      const { status, body } = await run(agreement({ sessionRule: 'every', scale }))
      expect([status, body.code]).toEqual([422, 'statistics-refused'])
      expect(body.message).toContain('one value for each subject')
    }
    const ratio = await run(agreement({ sessionRule: 'every', scale: 'ratio' }))
    expect(ratio.status).toBe(201)
  })
})

describe('the scale of the limits', () => {
  test('ratio, percent and percentiles give what R gave for the published meters', async () => {
    const { run } = await aLockedStudy(ONCE)
    const ratio = (await run(agreement({ scale: 'ratio' }))).body
    // Base R 4.2.2, geometric mean ratio, its limits and their exact intervals.
    close(numbers(ratio.result.bias), [0.9882846257676575, 0.928250561307033, 1.0522013583848062])
    close(
      numbers(ratio.result.lowerLimit),
      [0.7782708453473078, 0.6733290507389291, 0.8419194984478853],
    )
    close(
      numbers(ratio.result.upperLimit),
      [1.2549699212911642, 1.1600948823840276, 1.4505634361934263],
    )
    expect(ratio.headline).toMatchObject({ label: 'Mean ratio', unit: '1' })
    const percent = (await run(agreement({ scale: 'percent' }))).body
    close(
      numbers(percent.result.bias),
      [-1.1583141283896237, -7.378734704621168, 5.062106447841922],
    )
    close(
      numbers(percent.result.lowerLimit),
      [-24.87073204346946, -39.24734468013515, -17.06805852362264],
      5,
    )
    expect(percent.headline).toMatchObject({ label: 'Bias', unit: '%' })
    const free = (await run(agreement({ scale: 'nonparametric' }))).body
    expect(free.result.bias.estimate).toBe(-8)
    expect(free.result.lowerLimit.estimate).toBeCloseTo(-65.8, 9)
    expect(free.result.upperLimit.estimate).toBeCloseTo(68.6, 9)
    // Conover 1999: the median of 17 lies between the 5th and the 13th value. 17 pairs are too few for more.
    expect([free.result.bias.lower, free.result.bias.upper]).toEqual([-24, 7])
    expect(free.result.lowerLimit).toMatchObject({ lower: null })
    expect(free.result.caveats[0]).toContain('too few pairs')
  })

  test('limits by regression lie on the lines that R fitted, and are judged where they are widest', async () => {
    const { run } = await aLockedStudy(ONCE)
    const { body } = await run(
      agreement({ scale: 'regression', acceptance: { lower: -120, upper: 120 } }),
    )
    const { centre, alongMean, sd, slopeOnMean } = body.result
    // Base R 4.2.2: difference on mean −15.067 + 0.028687·mean; |residuals| 67.718 − 0.085527·mean.
    const z = 1.959963984540054 * Math.sqrt(Math.PI / 2)
    expect(sd).toBeCloseTo(39.89603418283774, 9)
    expect(alongMean).toHaveLength(3)
    expect(alongMean[1].mean).toBe(centre)
    for (const { mean, bias, lowerLimit, upperLimit } of alongMean) {
      const line = -15.067497300039001 + 0.028687445152549257 * mean
      const half = z * (67.71813550446399 - 0.0855265360177655 * mean)
      close(
        [bias.estimate, lowerLimit.estimate, upperLimit.estimate],
        [line, line - half, line + half],
      )
    }
    // At the mean of the means the line's error is its residual SD over √n; t(15) by R's qt.
    const half = (2.131449545559774 * 39.89603418283774) / Math.sqrt(17)
    expect(alongMean[1].bias.upper - alongMean[1].bias.estimate).toBeCloseTo(half, 7)
    expect(slopeOnMean.p).toBeCloseTo(0.7494985336492939, 9)
    expect(body.result.acceptance.verdict).toBe('beyond')
    expect(body.asProtocol).toBe(false)
    const level = await run(agreement({ scale: 'regression', spread: 'constant' }))
    const [first] = level.body.result.alongMean
    const width = first.upperLimit.estimate - first.bias.estimate
    expect(width).toBeCloseTo(1.959963984540054 * 39.89603418283774, 9)
  })

  test('says so where a fitted spread falls below 0 and the limits cross', async () => {
    const apart = [10, -10, 0, 0, 0, 0, 0, 0, 0, 0]
    const { run } = await aLockedStudy(
      apart.map((difference, at) => {
        const mean = 100 + 10 * at
        return { sessions: [session(mean + difference / 2, mean - difference / 2)] }
      }),
    )
    const changing = await run(agreement({ scale: 'regression' }))
    expect(changing.body.result.caveats.join(' ')).toContain('limits cross')
    const constant = await run(agreement({ scale: 'regression', spread: 'constant' }))
    expect(constant.body.result.caveats.join(' ')).not.toContain('limits cross')
  })

  test('comes with hints: normality of the differences, and a slope on the mean', async () => {
    const { run } = await aLockedStudy(ONCE)
    const { body } = await run(agreement())
    // R 4.2.2: shapiro.test and lm(difference ~ mean).
    expect(body.result.normality.w).toBeCloseTo(0.9579395219372402, 4)
    expect(body.result.normality.p).toBeCloseTo(0.5931333758174963, 3)
    close(
      [body.result.slopeOnMean.lower, body.result.slopeOnMean.upper],
      [-0.1593200636839565, 0.216694953989055],
      9,
    )
  })

  test('is refused where it has no meaning', async () => {
    const { run } = await aLockedStudy([...ONCE, { sessions: [session(0, 5)] }])
    const { status, body } = await run(agreement({ scale: 'ratio' }))
    expect([status, body.code]).toEqual([422, 'statistics-refused'])
    expect(body.message).toContain('above 0')
  })
})

describe('lines of the sensor on the reference', () => {
  test('ordinary, Deming and Passing–Bablok, concordance and correlations are R’s', async () => {
    const { run } = await aLockedStudy(ONCE)
    const { body } = await run(agreement({ decisionLevels: [300, 600] }))
    const { lines, concordance, pearson, spearman, levels } = body.result.comparison
    const line = (name: string) => lines.find((each: { line: string }) => each.line === name)
    // Base R 4.2.2 and epiR 2.0.57; x = mini, y = Wright.
    expect(line('ordinary').slope.estimate).toBeCloseTo(0.9699440613933964, 9)
    expect(line('ordinary').intercept.estimate).toBeCloseTo(11.481781162470346, 7)
    close(
      numbers(line('deming').slope),
      [1.0299925383654307, 0.7442790568516136, 1.3157060198792478],
    )
    close(
      numbers(line('passingBablok').slope),
      [0.9391304347826087, 0.7159090909090909, 1.1946308724832215],
      9,
    )
    close(
      numbers(line('passingBablok').intercept),
      [22.82608695652172, -99.08053691275165, 127.45454545454544],
      9,
    )
    close(numbers(concordance), [0.9427424314274845, 0.8504918731685605, 0.9787262791701224])
    close(numbers(pearson), [0.9432794468909461, 0.8463588087924647, 0.9797313373519239], 9)
    expect(spearman.estimate).toBeGreaterThan(0.8)
    const predicted = (at: number) => -15.688388535699573 + 1.0299925383654307 * at - at
    close(
      levels.map((each: Line) => each.estimate),
      [predicted(300), predicted(600)],
    )
    expect(levels[0].lower).toBeLessThan(levels[0].estimate)
  })

  test('the stated ratio of error variances moves the Deming line', async () => {
    const { run } = await aLockedStudy(ONCE)
    const slope = async (errorVarianceRatio: number) =>
      (await run(agreement({ errorVarianceRatio }))).body.result.comparison.lines[1].slope.estimate
    // The larger the sensor's share of the error, the closer to ordinary regression of the sensor.
    expect(await slope(1e6)).toBeCloseTo(0.9699440613933964, 5)
    expect(await slope(1)).toBeCloseTo(1.0299925383654307, 9)
    const refused = await run(agreement({ errorVarianceRatio: 0 }))
    expect(Object.keys(refused.body.fields)).toEqual(['parameters.errorVarianceRatio'])
  })

  test('a reference that never varies leaves the limits and says why there are no lines', async () => {
    const { run } = await aLockedStudy(
      [1, 2, 4, 3].map((value) => ({ sessions: [session(value, 2)] })),
    )
    const { body, status } = await run(agreement())
    expect(status).toBe(201)
    const { lines, concordance } = body.result.comparison
    expect(lines[0]).toMatchObject({ slope: { estimate: null } })
    expect(lines[0].note).toBeTruthy()
    expect(concordance.note).toContain('never varies')
  })
})

describe('precision', () => {
  const precision = (more: object = {}) => ({
    kind: 'precision',
    analyteKey: 'ammonia',
    measuredBy: 'sensor',
    confidence: 0.95,
    reliabilityWanted: 0.99,
    accuracyId: null,
    ...more,
  })

  test('of the published meters: within-subject SD 15.3 and 19.9, with R’s interval, coefficient and CV', async () => {
    const { run, datasetId, analyst } = await aLockedStudy(TWICE)
    const { body, status } = await run(precision())
    expect(status).toBe(201)
    const { result } = body
    // Base R 4.2.2; Bland & Altman 1986 print 15.3 and 19.9 L/min.
    close(
      numbers(result.withinSubjectSd),
      [15.306669057866863, 11.485934584231034, 22.946900927380465],
    )
    expect(result.repeatabilityCoefficient).toBeCloseTo(42.42714237070512, 9)
    expect(result.cvPercent).toBeCloseTo(3.4175646701305054, 9)
    expect(result.cvLogPercent).toBeCloseTo(3.50357956876907, 9)
    expect(result.reliability).toBeCloseTo(0.9831650200775257, 9)
    expect(result.betweenSubjectSd).toBeCloseTo(Math.sqrt(13682.806985294117), 9)
    // Spearman–Brown: 0.99·(1 − 0.98317)/(0.98317·0.01) = 1.695, so two sessions.
    expect(result.sessionsForReliability).toBe(2)
    expect(result.intraclass[0].estimate).toBeCloseTo(result.reliability, 9)
    expect(body.headline).toMatchObject({ label: 'Within-subject SD', unit: '[ppb]' })
    const mini = await run(precision({ measuredBy: 'reference' }))
    expect(mini.body.result.withinSubjectSd.estimate.toFixed(1)).toBe('19.9')

    const looked = await api
      .as(analyst)
      .get(`/api/datasets/${datasetId}/precision?analyteKey=ammonia&reliabilityWanted=0.99`)
      .expect(200)
    expect(looked.body.result).toEqual(result)
    expect(looked.body.caution.title).toBe('For research use only')
  })

  test('gives Shrout and Fleiss’s six intraclass correlations as they print them', async () => {
    // Shrout & Fleiss 1979, Psychol Bull 86:420, table 2: six targets, four judges.
    const table = [
      [9, 2, 5, 8],
      [6, 1, 3, 2],
      [8, 4, 6, 8],
      [7, 1, 2, 6],
      [10, 5, 6, 9],
      [6, 2, 4, 7],
    ]
    const { run } = await aLockedStudy(
      table.map((row) => ({ sessions: row.map((value) => ({ sensor: { ammonia: value } })) })),
    )
    const { body } = await run(precision())
    const rounded = body.result.intraclass.map(({ estimate }: Line) => estimate.toFixed(2))
    expect(rounded).toEqual(['0.17', '0.29', '0.71', '0.44', '0.62', '0.91'])
    expect(body.result.sessionsEach).toBe(4)
  })

  test('with uneven sessions divides the spread one-way and gives no six', async () => {
    const { run } = await aLockedStudy([
      ...TWICE,
      { sessions: [session(400, 410)] },
      { sessions: [] },
    ])
    const { body } = await run(precision())
    expect(body.result).toMatchObject({ intraclass: null, sessionsEach: null })
    expect(body.result.withinSubjectSd.estimate).toBeCloseTo(15.306669057866863, 9)
    expect(body.result.counts).toMatchObject({ counted: 18, pairs: 35, severalSessions: 17 })
    const single = await aLockedStudy(ONCE)
    const refused = await single.run(precision())
    expect([refused.status, refused.body.code]).toEqual([422, 'statistics-refused'])
    expect(refused.body.message).toContain('second session')
  })

  test('says what the noise costs a stored area, and refuses an area that is not of this dataset and analyte', async () => {
    const outcomeOf = (at: number) => (at % 2 === 0 ? ('present' as const) : ('absent' as const))
    const subjects = Array.from({ length: 40 }, (_, at) => {
      const centre = 100 + 7 * ((at * 17) % 40) + (at % 2 === 0 ? 90 : 0)
      return {
        outcome: outcomeOf(at),
        sessions: [centre - 25, centre + 25].map((ammonia) => ({ sensor: { ammonia } })),
      }
    })
    const { run } = await aLockedStudy(subjects)
    const accuracy = await run({
      kind: 'accuracy',
      analyteKey: 'ammonia',
      direction: 'higher',
      sessionRule: 'first',
      cutOff: null,
      confidence: 0.95,
      prevalence: null,
    })
    expect(accuracy.status).toBe(201)
    const { body } = await run(precision({ accuracyId: accuracy.body.id }))
    const { noise, withinSubjectSd } = body.result
    // Two sessions 50 apart: within-subject variance 50²/2.
    expect(withinSubjectSd.estimate).toBeCloseTo(Math.sqrt(1250), 9)
    const area = accuracy.body.result.area.estimate
    expect(noise).toMatchObject({ analysisNumber: 1, observedArea: area, note: null })
    // With one session a subject it comes back to the area that was seen; more sessions raise it.
    const expected = noise.expected.map((each: { area: number }) => each.area)
    expect(expected[0]).toBeCloseTo(area, 12)
    expect([...expected].sort((a, b) => a - b)).toEqual(expected)
    expect(noise.areaWithoutNoise).toBeGreaterThan(expected.at(-1))
    const other = await aLockedStudy(TWICE)
    const foreign = await other.run(precision({ accuracyId: accuracy.body.id }))
    expect([foreign.status, Object.keys(foreign.body.fields)]).toEqual([
      422,
      ['parameters.accuracyId'],
    ])
    const reference = await run(
      precision({ measuredBy: 'reference', accuracyId: accuracy.body.id }),
    )
    expect(Object.keys(reference.body.fields)).toEqual(['parameters.accuracyId'])
  })
})

describe('two different measurands', () => {
  const BOTH: GivenSubject[] = [3, 1, 4, 1.5, 5, 9, 2, 6].map((value, at) => ({
    sessions: [{ sensor: { ammonia: value }, reference: { acetone: 10 * value + (at % 3) } }],
  }))

  test('are refused agreement with the reason, and given rank correlation instead', async () => {
    const { run, datasetId, analyst } = await aLockedStudy(BOTH)
    const refused = await run(agreement({ referenceKey: 'acetone' }))
    expect([refused.status, refused.body.code]).toEqual([422, 'statistics-refused'])
    expect(refused.body.message).toContain('different measurands')
    expect(refused.body.message).toContain('rank correlation')
    const parameters = {
      kind: 'correlation',
      analyteKey: 'ammonia',
      referenceKey: 'acetone',
      sessionRule: 'first',
      confidence: 0.95,
    }
    const { body, status } = await run(parameters)
    expect(status).toBe(201)
    // Ranks 4 1 5 2 6 8 3 7 on both sides.
    expect(body.result.rankCorrelation.estimate).toBe(1)
    expect(body.result.rankCorrelation.note).toContain('agree completely')
    expect(body.headline).toMatchObject({ label: 'Rank correlation', estimate: 1 })
    const strange = await run({ ...parameters, referenceKey: 'helium' })
    expect(Object.keys(strange.body.fields)).toEqual(['parameters.referenceKey'])
    const pairs = await api
      .as(analyst)
      .get(
        `/api/datasets/${datasetId}/pairs?analyteKey=ammonia&referenceKey=acetone&sessionRule=first`,
      )
      .expect(200)
    expect(pairs.body).toMatchObject({ referenceKey: 'acetone', counts: { pairs: 8 } })
    expect(pairs.body.subjectIds).toHaveLength(8)
  })
})

describe('in print', () => {
  test('the closed part says the same figures as the stored results, method and source with them', async () => {
    const { run, study, analyst, datasetId } = await aLockedStudy(TWICE)
    const stored = [
      await run(agreement({ sessionRule: 'every', trueValue: 'varying' })),
      await run(agreement({ scale: 'ratio', decisionLevels: [300] })),
      await run({
        kind: 'precision',
        analyteKey: 'ammonia',
        measuredBy: 'sensor',
        confidence: 0.95,
        reliabilityWanted: 0.99,
        accuracyId: null,
      }),
      await run({
        kind: 'correlation',
        analyteKey: 'ammonia',
        referenceKey: 'ammonia',
        sessionRule: 'first',
        confidence: 0.95,
      }),
    ]
    const asked = await api
      .as(analyst)
      .post(`/api/studies/${study.id}/reports`)
      .send({
        id: aKey(),
        title: 'Meters',
        datasetId,
        analysisIds: stored.map(({ body }) => body.id),
      })
      .expect(202)
    await api.runJobs()
    const closed = await api
      .as(analyst)
      .get(`/api/reports/${asked.body.id}/closed.pdf`)
      .buffer(true)
      .parse((stream, done) => {
        const pieces: Buffer[] = []
        stream.on('data', (piece: Buffer) => pieces.push(piece))
        stream.on('end', () => done(null, Buffer.concat(pieces)))
      })
      .expect(200)
    const text = inOneLine(await pdfPages(closed.body))
    // The figures are those that the tests above hold against R.
    for (const words of [
      'Upper limit 67.7 46.1 to 103.5',
      'Lower limit −79.8 −115.6 to −58.2',
      'true value varies, MOVER (Zou)',
      'Zou 2013, Stat Methods Med Res 22:630',
      'Mean ratio 0.988 0.928 to 1.052',
      'Lower limit 0.778 0.673 to 0.842',
      'Deming −15.7',
      '0.744 to 1.316',
      'Within-subject SD 15.3 ppb 11.5 to 22.9',
      'ICC(1,1), one session, one-way 0.983',
      'The mean of 2 sessions',
      'Rank correlation 0.900',
    ])
      expect(text).toContain(words)
  })
})

type Mover = Record<'lower_limit_ci95' | 'upper_limit_ci95', { lower: number; upper: number }>

describe('public data sets with several sessions give what R gave', () => {
  const sets = [
    { name: 'systolic-bp', sensor: 'j', reference: 's', subjects: 85 },
    { name: 'cardiac-output', sensor: 'rv', reference: 'ic', subjects: 12 },
  ]
  for (const { name, sensor, reference, subjects } of sets) {
    const data = `reference/data/${name}.csv`
    test.skipIf(!hasReference(data))(
      `${name}: true value varies and constant, MOVER intervals, precision [skipped where the data set is absent]`,
      async () => {
        const bySubject = new Map<string, ReturnType<typeof session>[]>()
        for (const row of referenceRows(data))
          bySubject.set(row.subject!, [
            ...(bySubject.get(row.subject!) ?? []),
            session(Number(row[sensor]), Number(row[reference])),
          ])
        expect(bySubject.size).toBe(subjects)
        const { run } = await aLockedStudy(
          [...bySubject.values()].map((sessions) => ({ sessions })),
        )
        const results = `reference/results/agreement-${name}.json`
        const marker = `${sensor} - ${reference}`
        const every = (trueValue: string) => run(agreement({ sessionRule: 'every', trueValue }))
        const varying = (await every('varying')).body.result
        const zou = referenceValue<Mover & { lower: number; upper: number }>(
          results,
          marker,
          'limits_replicates_true_value_varies_zou',
        )
        const ends = (limit: { lower: number; upper: number }) => [limit.lower, limit.upper]
        close(numbers(varying.lowerLimit), [zou.lower, ...ends(zou.lower_limit_ci95)])
        close(numbers(varying.upperLimit), [zou.upper, ...ends(zou.upper_limit_ci95)])
        const constant = (await every('constant')).body.result
        const { mover } = referenceValue<{ mover: typeof zou }>(
          results,
          marker,
          'limits_replicates_true_value_constant',
        )
        close(numbers(constant.lowerLimit), [mover.lower, ...ends(mover.lower_limit_ci95)])
        close(numbers(constant.upperLimit), [mover.upper, ...ends(mover.upper_limit_ci95)])
        const repeated = referenceValue<{ within_subject_sd: number; icc_1_1: number }>(
          results,
          sensor,
          'repeatability',
        )
        const { body } = await run({
          kind: 'precision',
          analyteKey: 'ammonia',
          measuredBy: 'sensor',
          confidence: 0.95,
          reliabilityWanted: 0.9,
          accuracyId: null,
        })
        expect(body.result.withinSubjectSd.estimate).toBeCloseTo(repeated.within_subject_sd, 9)
        expect(body.result.reliability).toBeCloseTo(repeated.icc_1_1, 9)
      },
    )
  }

  const plasma = 'reference/data/plasma-volume.csv'
  test.skipIf(!hasReference(plasma))(
    'plasma volume: a slope on the mean, and ratios for it [skipped where the data set is absent]',
    async () => {
      const { run } = await aLockedStudy(
        referenceRows(plasma).map((row) => ({
          sessions: [session(Number(row.nadler), Number(row.hurley))],
        })),
      )
      const { body } = await run(agreement({ scale: 'ratio' }))
      // Bland & Altman 1999 print a mean ratio of 1.11; the antilogarithm of their printed 0.099 is 1.104.
      expect(body.result.bias.estimate).toBeCloseTo(1.1039557164579636, 9)
      expect(body.result.slopeOnMean.slope).toBeCloseTo(0.08899797381632321, 9)
      expect(body.result.slopeOnMean.p).toBeLessThan(0.001)
    },
  )
})
