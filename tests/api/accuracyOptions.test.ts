import { afterAll, beforeAll, expect, test } from 'vitest'
import { type Api, startApi } from '../support/api.ts'
import { breathAmmonia, breathAmmoniaReference } from '../support/breathAmmonia.ts'
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

test('every cut-off chosen from the data stands with what it may be expected to do elsewhere', async () => {
  const { result } = await ammonia.runLong(accuracy())
  const { corrections, rules } = result
  expect(corrections).toMatchObject({ seed: 20, replicates: 2_000, note: null })
  expect(corrections.rules.map((each: { rule: string }) => each.rule)).toEqual(
    rules.map((each: { rule: string }) => each.rule),
  )
  for (const each of corrections.rules) {
    const found = rules.find((rule: { rule: string }) => rule.rule === each.rule)
    expect(found.cutOffs.map((one: { threshold: number }) => one.threshold)).toContain(
      each.threshold,
    )
    const { apparent, optimism, corrected } = each
    expect(corrected.sensitivity).toBeCloseTo(apparent.sensitivity - optimism.sensitivity, 12)
  }
  const [youden] = corrections.rules
  // Choosing the best point of the same data flatters their sum.
  expect(youden.optimism.sensitivity + youden.optimism.specificity).toBeGreaterThan(0)
})

test('the area takes the interval that was chosen, and says which', async () => {
  const logit = await ammonia.run(accuracy({ areaInterval: 'logit', resampling: null }))
  const expected = breathAmmoniaReference<{ lower: number; upper: number }>(
    'ammonia_ppb',
    'auc_ci95_logit',
  )
  expect(logit.body.result.area.method).toBe('DeLong, logit scale')
  expect(logit.body.result.area.lower).toBeCloseTo(expected.lower, 9)
  expect(logit.body.result.area.upper).toBeCloseTo(expected.upper, 9)
  const { result } = await ammonia.runLong(accuracy({ areaInterval: 'bootstrap' }))
  // R 4.2.2: 50,000 stratified replicates; four Monte-Carlo SDs of a bound of 2,000 replicates apart at most.
  const { reference_50000_reps: bootstrap } = breathAmmoniaReference<{
    reference_50000_reps: { lower: number; upper: number }
  }>('ammonia_ppb', 'auc_ci95_bootstrap')
  expect(result.area.method).toContain('bootstrap')
  expect(Math.abs(result.area.lower - bootstrap.lower)).toBeLessThan(0.0104)
  expect(Math.abs(result.area.upper - bootstrap.upper)).toBeLessThan(0.0104)
})

test('more on the area is R’s partial, binormal and rank figures', async () => {
  const { body } = await ammonia.run(
    accuracy({ resampling: null, partialArea: { from: 0.9, to: 1 } }),
  )
  const figure = (key: string) =>
    body.result.more.figures.find((each: { key: string }) => each.key === key)
  const reference = <T>(quantity: string) => breathAmmoniaReference<T>('ammonia_ppb', quantity)
  const part = reference<{ raw: number; mcclish: number }>('partial_auc_spec_0.9_1')
  expect(figure('partialArea').value).toBeCloseTo(part.raw, 12)
  expect(figure('partialAreaCorrected').value).toBeCloseTo(part.mcclish, 12)
  const half = reference<{ z: number; p: number }>('auc_test_vs_half')
  expect(figure('testAgainstHalf').value).toBeCloseTo(half.z, 9)
  expect(figure('testAgainstHalf').p).toBeCloseTo(half.p, 12)
  expect(figure('hanleyMcNeil').value).toBeCloseTo(reference<number>('auc_se_hanley_mcneil'), 12)
  const ranks = reference<{ u_in_disease_direction: number; p_two_sided_uncorrected: number }>(
    'mann_whitney',
  )
  expect(figure('mannWhitney').value).toBeCloseTo(ranks.u_in_disease_direction, 6)
  expect(figure('mannWhitney').p).toBeCloseTo(ranks.p_two_sided_uncorrected, 12)
  const smooth = reference<{ auc: number }>('auc_binormal_smoothed')
  expect(figure('binormalCurve').value).toBeCloseTo(smooth.auc, 9)
  const moments = reference<{ raw: number; log: number }>('auc_binormal_moments')
  expect(figure('binormalRaw').value).toBeCloseTo(moments.raw, 9)
  expect(figure('binormalLog').value).toBeCloseTo(moments.log, 9)
})

test('results in doubt are counted once as positive and once as negative, and missing ones for themselves', async () => {
  const values = [100, 200, 300, 400, 500, 600, 700, 800, 900, 1_000, 1_100, 1_200]
  const of = (outcome: 'present' | 'absent' | 'indeterminate', ...readings: number[]) =>
    readings.map((each): GivenSubject => ({ outcome, sessions: [{ sensor: { ammonia: each } }] }))
  const { run } = await lockedStudy(api, [
    ...of('present', ...values.map((each) => each + 300)),
    ...of('absent', ...values),
    ...of('indeterminate', 100, 900, 1_000),
    { outcome: 'present', sessions: [] },
    { outcome: 'absent', sessions: [] },
    { outcome: 'absent', sessions: [] },
  ])
  const { body } = await run(
    accuracy({
      cutOff: 800,
      resampling: null,
      troubledResults: { zone: { lower: 700, upper: 900 } },
    }),
  )
  const { index, reference } = body.result.troubled
  // By hand. Present 400…1500: in the zone 700, 800, 900; above it 6, below it 3.
  // Absent 100…1200: in the zone 700, 800, 900; above it 3, below it 6.
  expect(index).toMatchObject({
    indeterminatePresent: 3,
    indeterminateAbsent: 3,
    noValidPresent: 1,
    noValidAbsent: 2,
    determinate: { numerator: 18, denominator: 27 },
    valid: { numerator: 24, denominator: 27 },
  })
  const [leftOut, positive, negative] = index.scenarios
  expect([leftOut.sensitivity.numerator, leftOut.sensitivity.denominator]).toEqual([6, 9])
  expect([positive.sensitivity.numerator, positive.specificity.numerator]).toEqual([9, 6])
  expect([negative.sensitivity.numerator, negative.specificity.numerator]).toEqual([6, 9])
  // Indeterminate outcomes: 900 lies in the zone, 1,000 is positive, 100 negative.
  expect(reference).toMatchObject({ indexPositive: 1, indexNegative: 1 })
  const [, best, worst] = reference.scenarios
  expect([best.sensitivity.numerator, best.sensitivity.denominator]).toEqual([7, 10])
  expect([worst.sensitivity.numerator, worst.sensitivity.denominator]).toEqual([6, 10])
})

test('subgroups carry their own area, and counts alone where a class has fewer than ten', async () => {
  const { body } = await ammonia.run(
    accuracy({ resampling: null, subgroups: ['site', 'sex', 'ageBand'] }),
  )
  const [site, sex, ageBand] = body.result.subgroupTables
  const bySite = breathAmmoniaReference<Record<'auc1' | 'auc2' | 'cases1' | 'cases2', number>>(
    'ammonia_ppb',
    'unpaired_auc_difference',
  )
  const areaOfSite = (present: number) =>
    site.rows.find((row: { present: number }) => row.present === present).area.estimate
  expect(areaOfSite(bySite.cases1)).toBeCloseTo(bySite.auc1, 12)
  expect(areaOfSite(bySite.cases2)).toBeCloseTo(bySite.auc2, 12)
  expect(
    sex.rows.map((row: { subgroup: string; present: number }) => [row.subgroup, row.present]),
  ).toEqual([
    ['F', 41],
    ['M', 49],
  ])
  expect(ageBand.rows).toHaveLength(1)
  const few = await lockedStudy(
    api,
    breathAmmonia().filter((_, at) => at % 9 === 0),
  )
  const small = await few.run(accuracy({ resampling: null, subgroups: ['sex'] }))
  for (const row of small.body.result.subgroupTables[0].rows)
    expect(row).toMatchObject({ area: null, sensitivity: null, present: expect.any(Number) })
})

test('a success criterion is met where every interval lies above its floor, and not else', async () => {
  const verdict = async (floors: object) =>
    (await ammonia.run(accuracy({ resampling: null, floors }))).body.result.success
  // R 4.2.2: area 0.6847 (0.6135 to 0.7559); sensitivity at 680 is 48/90, 0.533 (0.431 to 0.633).
  expect(await verdict({ sensitivity: null, specificity: null, area: 0.6 })).toMatchObject({
    met: true,
  })
  const both = await verdict({ sensitivity: 0.5, specificity: null, area: 0.6 })
  expect(both.met).toBe(false)
  expect(both.parts.map((part: { met: boolean }) => part.met)).toEqual([false, true])
  const none = await ammonia.run(
    accuracy({ resampling: null, floors: { sensitivity: null, specificity: null, area: null } }),
  )
  expect(none.status).toBe(422)
})
