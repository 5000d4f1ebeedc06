import { describe, expect, test } from 'vitest'
import { quantileInterval } from '#shared/statistics/description/quantileInterval.ts'

const oneTo = (n: number) => Array.from({ length: n }, (_, at) => at + 1)

describe('the interval of a percentile between order statistics', () => {
  test('of a median has the ranks of the published tables', () => {
    // Conover 1999, section 3.2, and Campbell & Gardner 1988, BMJ 296:1454 (from memory): at 95 %.
    for (const [n, lower, upper] of [
      [6, 1, 6],
      [10, 2, 9],
      [20, 6, 15],
      [30, 10, 21],
    ] as const)
      expect(quantileInterval(oneTo(n), 0.5)).toMatchObject({ lowerRank: lower, upperRank: upper })
  })

  test('covers at least the level, as the binomial distribution counts it', () => {
    for (const n of [40, 150, 400]) {
      const { lowerRank, upperRank } = quantileInterval(oneTo(n), 0.025)
      let below = (1 - 0.025) ** n
      let missedBelow = 0
      let covered = 0
      for (let k = 0; k < n; k += 1) {
        if (k < lowerRank) missedBelow += below
        else if (k < upperRank) covered += below
        below *= ((n - k) / (k + 1)) * (0.025 / 0.975)
      }
      expect(missedBelow).toBeLessThanOrEqual(0.025)
      expect(covered + missedBelow).toBeGreaterThanOrEqual(0.975)
    }
  })

  test('has no bound where no value lies far enough out: 0.975ⁿ is above 0.025 up to 145', () => {
    expect(quantileInterval(oneTo(145), 0.025).lower).toBeNull()
    expect(quantileInterval(oneTo(146), 0.025).lower).toBe(1)
    expect(quantileInterval(oneTo(145), 0.975).upper).toBeNull()
    expect(quantileInterval(oneTo(146), 0.975).upper).toBe(146)
    expect(quantileInterval(oneTo(5), 0.5)).toMatchObject({ lower: null, upper: null })
  })

  test('refuses a share or a level outside 0 to 1', () => {
    expect(() => quantileInterval([1, 2], 0)).toThrow(/between 0 and 1/i)
    expect(() => quantileInterval([1, 2], 0.5, { level: 1 })).toThrow(/between 0 and 1/i)
  })
})
