import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { biasAtLevels } from '#shared/statistics/agreement/biasAtLevels.ts'
import { demingRegression } from '#shared/statistics/agreement/demingRegression.ts'
import { differenceOnMean } from '#shared/statistics/agreement/differenceOnMean.ts'
import { intraclassCorrelations } from '#shared/statistics/agreement/intraclassCorrelations.ts'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import { linConcordance } from '#shared/statistics/agreement/linConcordance.ts'
import { nonparametricLimits } from '#shared/statistics/agreement/nonparametricLimits.ts'
import { ordinaryRegression } from '#shared/statistics/agreement/ordinaryRegression.ts'
import { pearson } from '#shared/statistics/agreement/pearson.ts'
import { percentLimits } from '#shared/statistics/agreement/percentLimits.ts'
import { ratioLimits } from '#shared/statistics/agreement/ratioLimits.ts'
import { repeatability } from '#shared/statistics/agreement/repeatability.ts'
import { replicateLimitsConstant } from '#shared/statistics/agreement/replicateLimitsConstant.ts'
import { replicateLimitsVarying } from '#shared/statistics/agreement/replicateLimitsVarying.ts'
import { shapiroWilk } from '#shared/statistics/agreement/shapiroWilk.ts'
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

describe('replicates', () => {
  const subjects = [
    { first: [10, 11], second: [9, 12] },
    { first: [20, 22, 21], second: [22, 24, 20] },
    { first: [31], second: [29] },
    { first: [15, 15], second: [13, 16] },
  ]

  test('one pair each gives the simple limits', () => {
    const single = subjects.map(({ first, second }) => ({
      first: first.slice(0, 1),
      second: second.slice(0, 1),
    }))
    const constant = replicateLimitsConstant(single)
    const simple = limitsOfAgreement({
      first: single.map((s) => s.first[0]!),
      second: single.map((s) => s.second[0]!),
    })
    expect(constant.sd).toBeCloseTo(simple.sd, 12)
    expect(constant.upper).toBeCloseTo(simple.upper, 12)
    expect(constant.meanSquareWithinFirst).toBeNull()
    expectRefusal(() => replicateLimitsVarying(single), 'too-few')
  })

  test('limits from replicates are those of single readings: wider than those of the means', () => {
    const means = (of: 'first' | 'second') =>
      subjects.map((s) => s[of].reduce((a, b) => a + b, 0) / s[of].length)
    const ofMeans = limitsOfAgreement({ first: means('first'), second: means('second') })
    expect(replicateLimitsConstant(subjects).sd).toBeGreaterThan(ofMeans.sd)
    expect(replicateLimitsVarying(subjects).mover.sd).toBeGreaterThan(ofMeans.sd)
  })

  test('that all agree leave nothing within subjects, and still give no NaN', () => {
    const answer = repeatability([
      [5, 5],
      [7, 7],
    ])
    expect(answer.withinSubjectSd).toBe(0)
    expect(answer.reliability).toBe(1)
    const constant = repeatability([
      [5, 5],
      [5, 5],
    ])
    expect(constant.reliability).toBeNull()
    expect(constant.notDefined?.code).toBe('zero-variance')
    expect(everyNumber([answer, constant]).every(({ value }) => Number.isFinite(value))).toBe(true)
  })

  test('that are none are refused', () => {
    expectRefusal(() => repeatability([[1], [2]]), 'too-few')
    expectRefusal(() => repeatability([[1, 2]]), 'too-few')
    expectRefusal(() => repeatability([[1, 2], []]), 'too-few')
    expectRefusal(
      () =>
        repeatability([
          [1, Number.NaN],
          [1, 2],
        ]),
      'non-finite',
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
