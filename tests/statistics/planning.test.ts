import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { areaPower } from '#shared/statistics/planning/areaPower.ts'
import { areaPrecision } from '#shared/statistics/planning/areaPrecision.ts'
import { areaSampleSize } from '#shared/statistics/planning/areaSampleSize.ts'
import { areaSampleSizeAgainstHalf } from '#shared/statistics/planning/areaSampleSizeAgainstHalf.ts'
import { buderer } from '#shared/statistics/planning/buderer.ts'
import { limitsPrecision } from '#shared/statistics/planning/limitsPrecision.ts'
import { limitsSampleSize } from '#shared/statistics/planning/limitsSampleSize.ts'
import { twoAreasPower } from '#shared/statistics/planning/twoAreasPower.ts'
import { twoAreasSampleSize } from '#shared/statistics/planning/twoAreasSampleSize.ts'
import { clopperPearsonInterval } from '#shared/statistics/proportions/clopperPearsonInterval.ts'
import { mcnemarTest } from '#shared/statistics/proportions/mcnemarTest.ts'
import { newcombeIndependent } from '#shared/statistics/proportions/newcombeIndependent.ts'
import { newcombePaired } from '#shared/statistics/proportions/newcombePaired.ts'
import { wilsonInterval } from '#shared/statistics/proportions/wilsonInterval.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

describe('sample sizes', () => {
  test('for an area reach the power, and one subject fewer does not', () => {
    holdsForAll(
      fc.record({
        null: fc.double({ min: 0.5, max: 0.7, noNaN: true }),
        alternative: fc.double({ min: 0.75, max: 0.95, noNaN: true }),
        power: fc.constantFrom(0.8, 0.9),
        absentPerPresent: fc.constantFrom(1, 2),
      }),
      (plan) => {
        const { finite } = areaSampleSize(plan)
        expect(finite.power).toBeGreaterThanOrEqual(plan.power - 1e-9)
        const fewer = {
          nPresent: finite.present - 1,
          nAbsent: plan.absentPerPresent * (finite.present - 1),
        }
        if (fewer.nPresent > 0) expect(areaPower({ ...plan, ...fewer })).toBeLessThan(plan.power)
      },
    )
  })

  test('for two areas give back the power they were planned for', () => {
    const pilot = {
      area1: 0.7,
      area2: 0.8,
      variance1: 0.0031,
      variance2: 0.0021,
      covariance: 0.0009,
      nPresent: 40,
      nAbsent: 70,
    }
    const { present } = twoAreasSampleSize(pilot, { power: 0.9 })
    expect(twoAreasPower(pilot, { nPresent: present })).toBeGreaterThanOrEqual(0.9)
    expect(twoAreasPower(pilot, { nPresent: present - 1 })).toBeLessThan(0.9)
    expectRefusal(() => twoAreasPower({ ...pilot, area2: 0.7 }), 'out-of-range')
  })

  test('for a limit of agreement keep the half-width asked for', () => {
    const n = limitsSampleSize(0.34)
    expect(limitsPrecision(n).halfWidthSd).toBeLessThanOrEqual(0.34)
    expect(limitsPrecision(n - 1).halfWidthSd).toBeGreaterThan(0.34)
    // Bland & Altman: 100 pairs give about ±0.34 SD
    expect(n).toBe(100)
  })

  test('refuse plans that no study can meet', () => {
    expectRefusal(() => areaSampleSize({ alternative: 0.7, null: 0.7, power: 0.9 }), 'out-of-range')
    expectRefusal(() => areaSampleSize({ alternative: 1, null: 0.7, power: 0.9 }), 'out-of-range')
    expectRefusal(() => areaSampleSize({ alternative: 0.8, null: 0.7, power: 1 }), 'out-of-range')
    expectRefusal(
      () => areaSampleSize({ alternative: 0.7000001, null: 0.7, power: 0.9 }),
      'out-of-range',
    )
    expectRefusal(() => areaSampleSizeAgainstHalf({ area: 0.5, power: 0.9 }), 'out-of-range')
    expectRefusal(() => areaPrecision({ area: 0.8, halfWidth: 0 }), 'out-of-range')
    expectRefusal(() => limitsSampleSize(0), 'out-of-range')
    expectRefusal(
      () =>
        buderer({
          sensitivity: 0.9,
          sensitivityHalfWidth: 0.05,
          specificity: 0.9,
          specificityHalfWidth: 0.05,
          prevalence: 0,
        }),
      'out-of-range',
    )
  })
})

const proportion = fc
  .tuple(fc.integer({ min: 1, max: 60 }), fc.nat(60))
  .map(([denominator, x]) => ({ numerator: Math.min(x, denominator), denominator }))

describe('intervals of proportions', () => {
  test('hold the estimate, and the exact one holds nearly all of Wilson’s', () => {
    holdsForAll(proportion, ({ numerator, denominator }) => {
      const p = numerator / denominator
      for (const { lower, upper } of [
        wilsonInterval(numerator, denominator),
        clopperPearsonInterval(numerator, denominator),
      ]) {
        expect(lower).toBeLessThanOrEqual(p)
        expect(upper).toBeGreaterThanOrEqual(p)
      }
    })
  })

  test('of a proportion and of its complement mirror each other', () => {
    holdsForAll(proportion, ({ numerator, denominator }) => {
      for (const interval of [wilsonInterval, clopperPearsonInterval]) {
        const one = interval(numerator, denominator)
        const other = interval(denominator - numerator, denominator)
        expect(one.lower).toBeCloseTo(1 - other.upper, 12)
      }
    })
  })

  test('of a difference turn their sign when the groups are swapped, and stay in −1…1', () => {
    holdsForAll(fc.tuple(proportion, proportion), ([first, second]) => {
      const forth = newcombeIndependent(first, second)
      const back = newcombeIndependent(second, first)
      expect(back.method10.lower).toBeCloseTo(-forth.method10.upper, 12)
      expect(forth.method10.lower).toBeGreaterThanOrEqual(-1 - 1e-12)
      expect(forth.method11.upper).toBeLessThanOrEqual(1 + 1e-12)
    })
  })

  // Newcombe 1998, Stat Med 17:873, table II(a), as printed
  test('of a difference meet Newcombe’s printed example 56/70 against 48/80', () => {
    const { method10, method11 } = newcombeIndependent(
      { numerator: 56, denominator: 70 },
      { numerator: 48, denominator: 80 },
    )
    expect(method10.lower).toBeCloseTo(0.0524, 4)
    expect(method10.upper).toBeCloseTo(0.3339, 4)
    expect(method11.lower).toBeCloseTo(0.0428, 4)
    expect(method11.upper).toBeCloseTo(0.3422, 4)
  })

  test('of paired proportions that never disagree still have a width', () => {
    const { difference, method10 } = newcombePaired({
      bothPositive: 20,
      firstOnly: 0,
      secondOnly: 0,
      bothNegative: 0,
    })
    expect(difference).toBe(0)
    expect(method10.lower).toBeLessThan(0)
    expect(method10.upper).toBeGreaterThan(0)
  })

  test('refuse more hits than tries, and no tries', () => {
    expectRefusal(() => wilsonInterval(3, 2), 'out-of-range')
    expectRefusal(() => clopperPearsonInterval(0, 0), 'out-of-range')
    expectRefusal(() => wilsonInterval(1, 2, { level: 95 }), 'out-of-range')
    const nobody = { bothPositive: 0, firstOnly: 0, secondOnly: 0, bothNegative: 0 }
    expectRefusal(() => newcombePaired(nobody), 'out-of-range')
  })
})

describe('McNemar’s test', () => {
  test('sees only the discordant subjects', () => {
    expect(mcnemarTest({ firstOnly: 12, secondOnly: 2 }).exactP).toBeCloseTo(0.012939453125, 12)
    expect(mcnemarTest({ firstOnly: 2, secondOnly: 12 }).exactP).toBeCloseTo(0.012939453125, 12)
    expect(mcnemarTest({ firstOnly: 4, secondOnly: 4 }).exactP).toBe(1)
  })
  test('without any says that there is nothing to test', () => {
    expect(mcnemarTest({ firstOnly: 0, secondOnly: 0 })).toMatchObject({
      chiSquared: null,
      p: null,
      notDefined: { code: 'zero-denominator' },
    })
  })
})
