import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { comparisonResultOf } from '#shared/analyses/comparisonResultOf.ts'
import { comparisonParameters } from '#shared/schemas/comparison.ts'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { type Api, startApi } from '../support/api.ts'
import { breathAmmonia, breathAmmoniaReference } from '../support/breathAmmonia.ts'
import type { GivenSubject } from '../support/earlierData.ts'
import { lockedStudy } from '../support/lockedStudy.ts'
import { hasReference, referenceRows, referenceValue } from '../support/referenceFolder.ts'

let api: Api
let ammonia: Awaited<ReturnType<typeof lockedStudy>>
beforeAll(async () => {
  api = await startApi()
  ammonia = await lockedStudy(api, breathAmmonia())
})
afterAll(() => api.stop())

const marker = (analyteKey: string) => ({ analyteKey, direction: 'higher' })
const paired = (more: object = {}) => ({
  kind: 'comparison',
  sessionRule: 'first',
  confidence: 0.95,
  compare: {
    design: 'paired',
    markers: [marker('ammonia'), marker('acetone')],
    adjust: false,
    permutations: null,
    ...more,
  },
})
const independent = (analyteKey: string, by: object, groups: string[]) => ({
  kind: 'comparison',
  sessionRule: 'first',
  confidence: 0.95,
  compare: { design: 'independent', marker: marker(analyteKey), by, groups },
})

/** s100b under the key of ammonia, ndka under that of acetone. */
const asahSubjects = () =>
  referenceRows('reference/data/asah.csv').map(
    (row): GivenSubject => ({
      outcome: row.label === '1' ? 'present' : 'absent',
      sessions: [{ sensor: { ammonia: Number(row.s100b), acetone: Number(row.ndka) } }],
    }),
  )

type Areas = { auc1: number; auc2: number; difference: number; z: number; p: number }

describe('areas of several biomarkers in the same subjects', () => {
  test('differ as R’s paired DeLong says', async () => {
    const { body, status } = await ammonia.run(paired())
    expect(status).toBe(201)
    const expected = breathAmmoniaReference<Areas & { ci95: { lower: number; upper: number } }>(
      'ammonia_ppb vs isoprene_ppb',
      'paired_auc_difference',
    )
    const [one] = body.result.comparisons
    expect(body.result.curves.map((each: { label: string }) => each.label)).toEqual([
      'Ammonia',
      'Acetone',
    ])
    expect(one.difference.estimate).toBeCloseTo(expected.difference, 12)
    expect(one.statistic).toBeCloseTo(expected.z, 9)
    expect(one.p).toBeCloseTo(expected.p, 9)
    expect(one.pAdjusted).toBeNull()
    expect(body.headline).toMatchObject({ label: 'Difference of areas' })
  })

  test('are compared in the subjects who have all of them, and the others are counted', async () => {
    const given = breathAmmonia()
    delete given[0]!.sessions![0]!.sensor!.acetone
    const { run } = await lockedStudy(api, given)
    const { body } = await run(paired())
    expect(body.result.counts).toMatchObject({
      subjects: 240,
      present: 90,
      absent: 149,
      leftOut: [{ reason: 'incompleteAbsent', subjects: 1 }],
    })
  })

  test('take permutations as a job, and give the same curve twice a p value of 1', async () => {
    const given = breathAmmonia().map((each): GivenSubject => {
      const { ammonia } = each.sessions![0]!.sensor!
      return { ...each, sessions: [{ sensor: { ammonia: ammonia!, acetone: ammonia! } }] }
    })
    const { runLong } = await lockedStudy(api, given)
    const permutations = { seed: 3, replicates: 2_000 }
    const { result } = await runLong(paired({ permutations }))
    const [one] = result.comparisons
    expect(one).toMatchObject({ p: 1, difference: { estimate: 0 } })
    expect(one.permutation).toEqual({ statistic: 0, p: 1, permutations: 2_000, seed: 3 })
  })

  test('need no adjusting where they are two, and two different ones', async () => {
    const { body } = await ammonia.run(paired({ adjust: true }))
    // One pair alone needs no adjusting.
    expect(body.result.comparisons[0].pAdjusted).toBeNull()
    const same = await ammonia.run(paired({ markers: [marker('ammonia'), marker('ammonia')] }))
    expect(Object.keys(same.body.fields)).toEqual(['parameters.compare.markers'])
  })

  const asahRoc = 'reference/results/roc-asah.json'
  test.skipIf(!hasReference(asahRoc))(
    's100b and ndka in 113 patients: R’s statistic of the permutation test, and a p value near its own [skipped where the data set is absent]',
    async () => {
      const { runLong } = await lockedStudy(api, asahSubjects())
      const { result } = await runLong(paired({ permutations: { seed: 3, replicates: 20_000 } }))
      const expected = referenceValue<{ statistic: number; p: number }>(
        asahRoc,
        's100b vs ndka',
        'paired_venkatraman',
      )
      const { permutation, p } = result.comparisons[0]
      const { p: pDelong } = referenceValue<Areas>(
        asahRoc,
        's100b vs ndka',
        'paired_auc_difference',
      )
      expect(p).toBeCloseTo(pDelong, 9)
      expect(permutation.statistic).toBe(expected.statistic)
      // R drew 2,000 permutations: four Monte-Carlo SDs of its p value.
      expect(Math.abs(permutation.p - expected.p)).toBeLessThan(0.0366)
    },
  )

  test('with fewer than ten in a class are counted and nothing else', async () => {
    const few = breathAmmonia().filter((_, at) => at % 20 === 0)
    const { run } = await lockedStudy(api, few)
    const { body } = await run(paired())
    expect(body.result.comparisons).toEqual([])
    expect(body.result.areaWithheld).toContain('at least 10 subjects')
    expect(body.result.curves.map((each: { area: unknown }) => each.area)).toEqual([null, null])
  })
})

test('three biomarkers are compared pair by pair, and Holm’s rule adjusts their p values', () => {
  const rows = breathAmmonia().map((each, at): DatasetRow => {
    const { ammonia, acetone } = each.sessions![0]!.sensor!
    const value = (ammonia as { value: number }).value
    const readings = { ammonia: value, acetone: acetone as number, both: value + Number(acetone) }
    return {
      subject: `S${at}`,
      subjectId: String(at),
      site: 'N',
      sex: null,
      ageBand: null,
      covariates: {},
      session: 1,
      sensorValues: Object.fromEntries(
        Object.entries(readings).map(([key, reading]) => [
          key,
          { value: reading, belowLod: false },
        ]),
      ),
      referenceValues: {},
      outcome: each.outcome ?? null,
    }
  })
  const analytes = ['ammonia', 'acetone', 'both'].map((key) => ({ key, name: key, unit: '[ppb]' }))
  const asked = paired({ adjust: true, markers: analytes.map(({ key }) => marker(key)) })
  const { comparisons } = comparisonResultOf(rows, analytes, comparisonParameters.parse(asked))
  expect(comparisons.map(({ first, second }) => [first, second])).toEqual([
    [0, 1],
    [0, 2],
    [1, 2],
  ])
  // Holm 1979: the smallest p times three, the next times two, the last as it is, never falling.
  const rising = comparisons.toSorted((one, other) => one.p! - other.p!)
  let largest = 0
  for (const [rank, { p, pAdjusted }] of rising.entries()) {
    largest = Math.min(1, Math.max(largest, (3 - rank) * p!))
    expect(pAdjusted).toBeCloseTo(largest, 12)
  }
})

describe('the area of one biomarker in two groups', () => {
  test.each([
    ['ammonia', 'ammonia_ppb', { kind: 'covariate', name: 'group' }, ['A', 'B']],
    ['acetone', 'isoprene_ppb', { kind: 'sex' }, ['F', 'M']],
  ])('of %s differs as R says (%s)', async (key, name, by, groups) => {
    const { body } = await ammonia.run(independent(key, by, groups))
    const expected = breathAmmoniaReference<{
      auc1: number
      auc2: number
      difference: number
      d_statistic: number
      df: number
      p_t: number
    }>(name, 'unpaired_auc_difference')
    const [one] = body.result.comparisons
    const areas = body.result.curves.map(
      (each: { area: { estimate: number } }) => each.area.estimate,
    )
    expect(areas[0]).toBeCloseTo(expected.auc1, 12)
    expect(areas[1]).toBeCloseTo(expected.auc2, 12)
    expect(one.statistic).toBeCloseTo(expected.d_statistic, 9)
    expect(one.degreesOfFreedom).toBeCloseTo(expected.df, 6)
    expect(one.p).toBeCloseTo(expected.p_t, 9)
  })

  test('needs both groups to be there', async () => {
    const answer = await ammonia.run(independent('ammonia', { kind: 'sex' }, ['F', 'X']))
    expect([answer.status, answer.body.code]).toEqual([422, 'statistics-refused'])
  })
})
