import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { intraclassCorrelations } from '#shared/statistics/agreement/intraclassCorrelations.ts'
import { linConcordance } from '#shared/statistics/agreement/linConcordance.ts'
import { pearson } from '#shared/statistics/agreement/pearson.ts'
import { shapiroWilk } from '#shared/statistics/agreement/shapiroWilk.ts'
import { spearman } from '#shared/statistics/agreement/spearman.ts'
import { somePairs } from './support/arbitraries.ts'
import { everyNumber } from './support/everyNumber.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

describe('correlations', () => {
  test('concordance is at most the correlation, and 1 only on the line of identity', () => {
    holdsForAll(somePairs, (pairs) => {
      fc.pre(new Set(pairs.first).size > 1 && new Set(pairs.second).size > 1)
      const { estimate, biasCorrection } = linConcordance(pairs)
      const { r } = pearson(pairs)
      expect(Math.abs(estimate)).toBeLessThanOrEqual(Math.abs(r) + 1e-12)
      expect(estimate).toBeCloseTo(r * biasCorrection, 9)
    })
    const same = [1, 2, 4]
    expect(linConcordance({ first: same, second: same }).estimate).toBeCloseTo(1, 14)
  })

  test('of ranks does not mind an increasing change of scale', () => {
    holdsForAll(somePairs, ({ first, second }) => {
      fc.pre(new Set(first).size > 1 && new Set(second).size > 1)
      const plain = spearman({ first, second }).rho
      expect(spearman({ first: first.map((v) => v ** 3), second }).rho).toBeCloseTo(plain, 10)
    })
  })

  test('with a constant are refused', () => {
    for (const ask of [pearson, spearman, linConcordance]) {
      expectRefusal(() => ask({ first: [2, 2, 2], second: [1, 2, 3] }), 'constant')
    }
  })

  // Shrout & Fleiss 1979, Psychol Bull 86:420, table 4, as printed
  test('intraclass meet the published two decimals', () => {
    const answer = intraclassCorrelations([
      [9, 2, 5, 8],
      [6, 1, 3, 2],
      [8, 4, 6, 8],
      [7, 1, 2, 6],
      [10, 5, 6, 9],
      [6, 2, 4, 7],
    ])
    const printed = {
      single1: 0.17,
      single2: 0.29,
      single3: 0.71,
      mean1: 0.44,
      mean2: 0.62,
      mean3: 0.91,
    }
    for (const [form, value] of Object.entries(printed)) {
      expect(answer[form as keyof typeof answer].estimate).toBeCloseTo(value, 2)
    }
  })

  test('intraclass of perfect agreement is 1 without an invented interval', () => {
    const answer = intraclassCorrelations([
      [1, 1],
      [2, 2],
      [5, 5],
    ])
    expect(answer.single2).toMatchObject({ estimate: 1, lower: null, upper: null, f: null })
    expect(everyNumber(answer).every(({ value }) => Number.isFinite(value))).toBe(true)
    expectRefusal(
      () =>
        intraclassCorrelations([
          [1, 1],
          [1, 1],
        ]),
      'constant',
    )
    expectRefusal(() => intraclassCorrelations([[1, 2]]), 'too-few')
    expectRefusal(
      () =>
        intraclassCorrelations([
          [1, 2],
          [1, 2, 3],
        ]),
      'unequal-length',
    )
  })
})

describe('Shapiro–Wilk', () => {
  // scipy 1.17.1, scipy.stats.shapiro
  test('agrees with scipy from 3 to 60 values', () => {
    expect(shapiroWilk([1, 2, 4]).w).toBeCloseTo(0.9642857142857, 9)
    expect(shapiroWilk([1, 2, 4]).p).toBeCloseTo(0.6368868, 5)
    const skew = Array.from({ length: 60 }, (_, i) => Math.exp(i / 12))
    expect(shapiroWilk(skew)).toMatchObject({
      w: expect.closeTo(0.7636314, 6),
      p: expect.closeTo(1.86298e-8, 12),
    })
  })

  test('does not mind place and scale', () => {
    const values = [3, 5, 6, 6.5, 9, 14]
    const plain = shapiroWilk(values)
    const moved = shapiroWilk(values.map((v) => 100 + 7 * v))
    expect(moved.w).toBeCloseTo(plain.w, 10)
  })

  test('refuses constants, too few and too many values', () => {
    expectRefusal(() => shapiroWilk([2, 2, 2, 2]), 'constant')
    expectRefusal(() => shapiroWilk([1, 2]), 'too-few')
    expectRefusal(() => shapiroWilk(new Float64Array(5001)), 'out-of-range')
  })
})
