import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type Api, startApi } from '../support/api.ts'
import { breathAmmonia } from '../support/breathAmmonia.ts'
import type { GivenSubject } from '../support/earlierData.ts'
import { lockedStudy } from '../support/lockedStudy.ts'
import { inventedProtocol } from '../support/makers.ts'
import { hasReference, referenceRows, referenceValue } from '../support/referenceFolder.ts'

let api: Api
let ammonia: Awaited<ReturnType<typeof lockedStudy>>
beforeAll(async () => {
  api = await startApi()
  ammonia = await lockedStudy(api, breathAmmonia())
})
afterAll(() => api.stop())

/** s100b under the key of ammonia, ndka under that of acetone. */
const asahSubjects = () =>
  referenceRows('reference/data/asah.csv').map(
    (row): GivenSubject => ({
      outcome: row.label === '1' ? 'present' : 'absent',
      sessions: [{ sensor: { ammonia: Number(row.s100b), acetone: Number(row.ndka) } }],
    }),
  )

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

describe('a panel of gases', () => {
  test('carries its corrected area, by bootstrap and by cross-validation, below the apparent one', async () => {
    const bootstrap = await ammonia.runLong(panel())
    const folds = await ammonia.runLong(
      panel({
        validation: 'crossValidation',
        scale: 'log',
        resampling: { seed: 1, replicates: 100 },
      }),
    )
    for (const { result, headline } of [bootstrap, folds]) {
      expect(result.area.estimate).toBeLessThan(result.area.apparent)
      expect(headline).toMatchObject({ label: 'Corrected area', estimate: result.area.estimate })
    }
    expect(folds.result.terms.map((each: { term: string }) => each.term)).toEqual([
      '(Intercept)',
      'ln Ammonia',
      'ln Acetone',
    ])
  })

  test('hides net benefit where subjects were sampled by outcome', async () => {
    const byOutcome = { ...inventedProtocol, sampling: 'byOutcome' as const }
    const { runLong } = await lockedStudy(api, breathAmmonia(), byOutcome)
    const { result } = await runLong(panel())
    expect(result.netBenefit).toBeNull()
    expect(result.netBenefitHidden).toContain('chosen by outcome')
  })

  test('of gases that say the same ends with the advice to leave one out', async () => {
    const doubled = breathAmmonia().map((each): GivenSubject => {
      const { value } = each.sessions![0]!.sensor!.ammonia as { value: number }
      return { ...each, sessions: [{ sensor: { ammonia: value, acetone: 2 * value } }] }
    })
    const { ask, runs } = await lockedStudy(api, doubled)
    await ask(panel()).expect(202)
    await api.runJobs()
    expect((await runs())[0].failure).toContain('Leave one of the analytes')
  })

  const asah = 'reference/results/model-asah.json'
  test.skipIf(!hasReference(asah))(
    's100b and ndka in 113 patients: R’s coefficients, Brier score and net benefit [skipped where the data set is absent]',
    async () => {
      const { runLong } = await lockedStudy(api, asahSubjects())
      const { result } = await runLong(panel())
      const r = <T>(quantity: string) => referenceValue<T>(asah, 's100b + ndka', quantity)
      const terms =
        r<{ estimate: number; se: number; odds_ratio: number; or_upper: number }[]>(
          'logistic_coefficients',
        )
      for (const [at, expected] of terms.entries()) {
        const found = result.terms[at]
        expect(found.estimate / expected.estimate).toBeCloseTo(1, 6)
        expect(found.standardError / expected.se).toBeCloseTo(1, 6)
        expect(found.oddsRatioUpper / expected.or_upper).toBeCloseTo(1, 5)
      }
      const brier = r<{ brier: number; scaled: number }>('brier')
      expect(result.brier.brier).toBeCloseTo(brier.brier, 7)
      expect(result.area.apparent).toBeCloseTo(r<{ auc: number }>('auc_fitted').auc, 9)
      const benefits = r<{ threshold: number; net_benefit: number }[]>('net_benefit')
      for (const expected of benefits) {
        const found = result.netBenefit.find(
          (each: { threshold: number }) => Math.abs(each.threshold - expected.threshold) < 1e-9,
        )
        if (found) expect(found.netBenefit).toBeCloseTo(expected.net_benefit, 7)
      }
      expect(result.netBenefit.length).toBeGreaterThan(4)
    },
  )
})
