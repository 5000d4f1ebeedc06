import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { differenceOnMean } from '#shared/statistics/agreement/differenceOnMean.ts'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import { linConcordance } from '#shared/statistics/agreement/linConcordance.ts'
import { nonparametricLimits } from '#shared/statistics/agreement/nonparametricLimits.ts'
import { percentLimits } from '#shared/statistics/agreement/percentLimits.ts'
import { ratioLimits } from '#shared/statistics/agreement/ratioLimits.ts'
import { spearman } from '#shared/statistics/agreement/spearman.ts'
import { somePairs } from './support/arbitraries.ts'
import { everyNumber } from './support/everyNumber.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

describe('limits of agreement', () => {
  test('adding a constant to one method moves the bias and the limits by it and nothing else', () => {
    holdsForAll(somePairs, ({ first, second }) => {
      const plain = limitsOfAgreement({ first, second })
      const moved = limitsOfAgreement({ first: first.map((v) => v + 10), second })
      expect(moved.bias).toBeCloseTo(plain.bias + 10, 9)
      expect(moved.sd).toBeCloseTo(plain.sd, 9)
      expect(moved.upper - moved.lower).toBeCloseTo(plain.upper - plain.lower, 9)
    })
  })

  test('swapping the methods turns the bias and exchanges the limits', () => {
    holdsForAll(somePairs, ({ first, second }) => {
      const forth = limitsOfAgreement({ first, second })
      const back = limitsOfAgreement({ first: second, second: first })
      expect(back.bias).toBeCloseTo(-forth.bias, 9)
      expect(back.lower).toBeCloseTo(-forth.upper, 9)
      expect(back.exact.lower.lower).toBeCloseTo(-forth.exact.upper.upper, 8)
    })
  })

  test('exact intervals hold their limit, and reach further outwards than inwards', () => {
    holdsForAll(somePairs, (pairs) => {
      const { upper, exact, sd } = limitsOfAgreement(pairs)
      fc.pre(sd > 1e-6)
      expect(exact.upper.lower).toBeLessThan(upper)
      expect(exact.upper.upper).toBeGreaterThan(upper)
      expect(exact.upper.upper - upper).toBeGreaterThan(upper - exact.upper.lower)
    })
  })

  test('of one method with itself are 0, without a test and without NaN', () => {
    const values = [3, 5, 9, 12]
    const answer = limitsOfAgreement({ first: values, second: values })
    expect(answer).toMatchObject({ bias: 0, sd: 0, lower: 0, upper: 0, t: null, p: null })
    expect(everyNumber(answer).every(({ value }) => Number.isFinite(value))).toBe(true)
  })

  // Bland & Altman 1986, Lancet i:307, as printed: bias −2.1, SD 38.8, SE of a limit 16.3 L/min
  test('meet the published peak-flow figures', () => {
    const wright = [
      494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427,
    ]
    const mini = [
      512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451,
    ]
    const answer = limitsOfAgreement({ first: wright, second: mini })
    expect(answer.bias).toBeCloseTo(-2.1, 1)
    expect(answer.sd).toBeCloseTo(38.8, 1)
    expect(answer.approximate1986.standardError).toBeCloseTo(16.3, 1)
  })

  test('of ratios do not mind the unit, and percent limits neither', () => {
    holdsForAll(somePairs, ({ first, second }) => {
      fc.pre(second.every((value) => value > 0))
      const scale = (values: number[]) => values.map((v) => v * 1000)
      const plain = ratioLimits({ first, second })
      const other = ratioLimits({ first: scale(first), second: scale(second) })
      expect(other.ratio).toBeCloseTo(plain.ratio, 9)
      const percent = percentLimits({ first, second })
      expect(percentLimits({ first: scale(first), second: scale(second) }).bias).toBeCloseTo(
        percent.bias,
        7,
      )
    })
  })

  test('between different units have no meaning and are refused; rank correlation is not', () => {
    const pairs = { first: [1, 2, 3], second: [5, 9, 7], firstUnit: 'ppb', secondUnit: 'µmol/L' }
    for (const ask of [
      limitsOfAgreement,
      ratioLimits,
      percentLimits,
      linConcordance,
      nonparametricLimits,
    ]) {
      expectRefusal(() => ask(pairs), 'different-units')
    }
    expect(spearman(pairs).rho).toBeCloseTo(0.5, 14)
  })

  test('refuse too few pairs, missing partners and values that are no numbers', () => {
    expectRefusal(() => limitsOfAgreement({ first: [1, 2], second: [1, 3] }), 'too-few')
    expectRefusal(() => limitsOfAgreement({ first: [1, 2, 3], second: [1, 3] }), 'unequal-length')
    expectRefusal(
      () => limitsOfAgreement({ first: [1, 2, Number.NaN], second: [1, 3, 4] }),
      'non-finite',
    )
    expectRefusal(() => ratioLimits({ first: [1, 2, 0], second: [1, 3, 4] }), 'not-positive')
    expectRefusal(() => percentLimits({ first: [1, 2, -4], second: [1, 3, 4] }), 'not-positive')
  })
})

describe('how far the readings depend on size', () => {
  test('a proportional difference shows as the slope of difference on mean', () => {
    const second = [100, 150, 200, 260, 310, 405]
    const { line } = differenceOnMean({ first: second.map((v) => 1.2 * v), second })
    // b = 1.2a: difference/mean = 0.2/1.1
    expect(line.slope).toBeCloseTo(0.2 / 1.1, 12)
    expect(line.intercept).toBeCloseTo(0, 9)
  })

  test('limits never cross where the fitted spread would fall below 0', () => {
    const { limitsAt } = differenceOnMean({ first: [1, 30, 5, 9, 12], second: [9, 22, 6, 9, 12] })
    for (const mean of [-1000, 0, 10, 1000]) {
      const { lower, upper } = limitsAt(mean, 'changing')
      expect(upper).toBeGreaterThanOrEqual(lower)
    }
  })
})
