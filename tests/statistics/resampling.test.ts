import { describe, expect, test } from 'vitest'
import { bootstrapArea } from '#shared/statistics/accuracy/bootstrapArea.ts'
import { bootstrapClusteredArea } from '#shared/statistics/accuracy/bootstrapClusteredArea.ts'
import { clusteredArea } from '#shared/statistics/accuracy/clusteredArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { venkatramanTest } from '#shared/statistics/accuracy/venkatramanTest.ts'
import { optimismOfCutOff } from '#shared/statistics/cutOffs/optimismOfCutOff.ts'
import { crossValidatedPanelArea } from '#shared/statistics/panel/crossValidatedPanelArea.ts'
import { panelArea } from '#shared/statistics/panel/panelArea.ts'
import { randomStream } from '#shared/statistics/random/randomStream.ts'
import { expectRefusal } from './support/refusal.ts'

const random = randomStream(7)
const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
const sample = (n: number, shift: number) => Array.from({ length: n }, () => shift + normal())
const present = sample(80, 1)
const absent = sample(120, 0)
const curve = rocCurve({ present, absent, direction: 'higher' })
const subjects = {
  present,
  absent,
  direction: 'higher' as const,
  presentSubjects: present.map((_, i) => `p${i >> 1}`),
  absentSubjects: absent.map((_, i) => `a${i >> 1}`),
}
const outcomes = [...present.map(() => 1), ...absent.map(() => 0)]
const panel = {
  outcomes,
  predictors: [
    { name: 'gas', values: [...present, ...absent] },
    ...['noise 1', 'noise 2', 'noise 3', 'noise 4'].map((name) => ({
      name,
      values: sample(200, 0),
    })),
  ],
}

describe('anything random', () => {
  test('repeats to the last digit with the same seed and differs with another', () => {
    const runs: ((seed: number) => unknown)[] = [
      (seed) => bootstrapArea(curve, { seed, replicates: 200 }),
      (seed) => bootstrapClusteredArea(subjects, { seed, replicates: 200 }),
      (seed) => optimismOfCutOff(curve, { kind: 'youden' }, { seed, replicates: 200 }),
      (seed) => panelArea(panel, { seed, replicates: 20 }),
      (seed) => crossValidatedPanelArea(panel, { seed, replicates: 2 }),
    ]
    for (const run of runs) {
      expect(JSON.stringify(run(1))).toBe(JSON.stringify(run(1)))
      expect(JSON.stringify(run(1))).not.toBe(JSON.stringify(run(2)))
    }
  })

  test('tells its progress and stops when told to', () => {
    const told: number[] = []
    bootstrapArea(curve, { seed: 1, replicates: 300, onProgress: (share) => told.push(share) })
    expect(told).toEqual([1 / 3, 2 / 3, 1])
    const cancel = () => {
      throw new Error('cancelled')
    }
    expect(() => bootstrapArea(curve, { seed: 1, onProgress: cancel })).toThrow('cancelled')
    expect(() => panelArea(panel, { seed: 1, onProgress: cancel })).toThrow('cancelled')
  })

  test('a seed that is no 32-bit whole number is refused', () => {
    for (const seed of [-1, 1.5, 2 ** 32, Number.NaN]) {
      expectRefusal(() => randomStream(seed), 'out-of-range')
    }
  })

  // Blackman & Vigna: equidistributed; 10⁵ draws in 16 bins, chi-squared 15 df, far tail 1e-4 = 44.3
  test('the stream is even, and streams of neighbouring seeds are unrelated', () => {
    const next = randomStream(123)
    const other = randomStream(124)
    const bins = new Array<number>(16).fill(0)
    let product = 0
    for (let i = 0; i < 100_000; i++) {
      const u = next()
      bins[Math.floor(u * 16)]!++
      product += (u - 0.5) * (other() - 0.5)
    }
    const chi = bins.reduce((s, count) => s + (count - 6250) ** 2 / 6250, 0)
    expect(chi).toBeLessThan(44.3)
    // SD of the mean product: (1/12)/√100000
    expect(Math.abs(product / 100_000)).toBeLessThan(4 / 12 / Math.sqrt(100_000))
  })
})

describe('bootstrap intervals', () => {
  test('lie near DeLong’s where subjects have one session', () => {
    const delong = delongArea(curve)
    const boot = bootstrapArea(curve, { seed: 3 })
    expect(Math.abs(boot.lower - delong.plain!.lower)).toBeLessThan(0.02)
    expect(Math.abs(boot.upper - delong.plain!.upper)).toBeLessThan(0.02)
    expect(boot.standardError / delong.standardError!).toBeCloseTo(1, 0)
  })

  test('of subjects lie near Obuchowski’s', () => {
    const obuchowski = clusteredArea(subjects)
    const boot = bootstrapClusteredArea(subjects, { seed: 3 })
    expect(Math.abs(boot.lower - obuchowski.plain!.lower)).toBeLessThan(0.02)
    expect(Math.abs(boot.upper - obuchowski.plain!.upper)).toBeLessThan(0.02)
  })

  test('of perfectly separated classes have no width', () => {
    const apart = rocCurve({ present: [5, 6], absent: [1, 2], direction: 'higher' })
    expect(bootstrapArea(apart, { seed: 1 })).toMatchObject({
      lower: 1,
      upper: 1,
      standardError: 0,
    })
  })
})

describe('optimism', () => {
  test('a cut-off chosen on noise looks better than it is, and is corrected downwards', () => {
    const noise = rocCurve({ present: sample(30, 0), absent: sample(30, 0), direction: 'higher' })
    const { apparent, corrected, optimism } = optimismOfCutOff(
      noise,
      { kind: 'youden' },
      { seed: 1, replicates: 500 },
    )
    expect(optimism.sensitivity + optimism.specificity).toBeGreaterThan(0.05)
    expect(corrected.sensitivity + corrected.specificity).toBeLessThan(
      apparent.sensitivity + apparent.specificity,
    )
  })

  test('a panel with four useless gases has its area corrected downwards by both ways', () => {
    const boot = panelArea(panel, { seed: 1, replicates: 60 })
    const folds = crossValidatedPanelArea(panel, { seed: 1, replicates: 4 })
    expect(boot.corrected).toBeLessThan(boot.apparent)
    expect(folds.corrected).toBeLessThan(folds.apparent)
    expect(Math.abs(boot.corrected - folds.corrected)).toBeLessThan(0.03)
  })
})

describe('Venkatraman’s test', () => {
  const isPresent = outcomes.map((outcome) => outcome === 1)
  const first = [...present, ...absent]

  test('a marker compared with itself gives p = 1', () => {
    const same = { first, second: first.map((v) => 2 * v + 1), present: isPresent }
    expect(venkatramanTest(same, { seed: 1, replicates: 50 })).toMatchObject({ statistic: 0, p: 1 })
  })

  test('a good marker and noise are told apart', () => {
    const second = sample(200, 0)
    expect(venkatramanTest({ first, second, present: isPresent }, { seed: 1 }).p).toBeLessThan(0.05)
  })

  test('one outcome only, or a marker that lacks subjects, is refused', () => {
    expectRefusal(
      () => venkatramanTest({ first: [1, 2], second: [1, 2], present: [1, 1] }, { seed: 1 }),
      'one-class',
    )
    expectRefusal(
      () => venkatramanTest({ first: [1, 2], second: [1], present: [1, 0] }, { seed: 1 }),
      'unequal-length',
    )
  })
})
