import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { biasAtLevels } from '#shared/statistics/agreement/biasAtLevels.ts'
import { demingRegression } from '#shared/statistics/agreement/demingRegression.ts'
import { ordinaryRegression } from '#shared/statistics/agreement/ordinaryRegression.ts'
import { pearson } from '#shared/statistics/agreement/pearson.ts'
import { somePairs } from './support/arbitraries.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

describe('lines through two methods', () => {
  const x = [10, 14, 19, 25, 31, 44, 52]
  const exact = x.map((v) => 3 + 1.1 * v)

  test('without error every regression finds the line', () => {
    expect(ordinaryRegression(x, exact).slope).toBeCloseTo(1.1, 12)
    const deming = demingRegression(x, exact)
    expect(deming.slope.estimate).toBeCloseTo(1.1, 12)
    expect(deming.slope.standardError).toBeCloseTo(0, 9)
    expect(deming.intercept.estimate).toBeCloseTo(3, 10)
    expect(biasAtLevels(x, exact, [0, 100])).toMatchObject([
      { bias: expect.closeTo(3, 9), biasPercent: null },
      { bias: expect.closeTo(13, 9), biasPercent: expect.closeTo(13, 9) },
    ])
  })

  test('Deming with equal errors treats both methods alike', () => {
    holdsForAll(somePairs, ({ first, second }) => {
      fc.pre(Math.abs(pearson({ first, second }).r) > 0.3)
      const forth = demingRegression(first, second).slope.estimate
      const back = demingRegression(second, first).slope.estimate
      expect(forth * back).toBeCloseTo(1, 6)
    })
  })

  test('Deming lies between the two ordinary lines', () => {
    const y = [12, 13, 24, 29, 30, 55, 56]
    const deming = demingRegression(x, y).slope.estimate
    expect(deming).toBeGreaterThan(ordinaryRegression(x, y).slope)
    expect(deming).toBeLessThan(1 / ordinaryRegression(y, x).slope)
  })

  test('are refused through points that give none', () => {
    expectRefusal(() => ordinaryRegression([1, 1, 1], [1, 2, 3]), 'constant')
    expectRefusal(() => demingRegression([1, 2, 3, 4], [5, 5, 5, 5]), 'constant')
    expectRefusal(() => demingRegression([1, 2], [1, 2]), 'too-few')
    expectRefusal(() => demingRegression(x, exact, { errorVarianceRatio: 0 }), 'out-of-range')
  })
})
