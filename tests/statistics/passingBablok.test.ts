import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { allSlopes } from '#shared/statistics/agreement/allSlopes.ts'
import { countInversions } from '#shared/statistics/agreement/countInversions.ts'
import { passingBablokRegression } from '#shared/statistics/agreement/passingBablokRegression.ts'
import { selectedSlopes } from '#shared/statistics/agreement/selectedSlopes.ts'
import { nthSmallest } from '#shared/statistics/description/nthSmallest.ts'
import { sortedOrder } from '#shared/statistics/description/sortedOrder.ts'
import { randomStream } from '#shared/statistics/random/randomStream.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

const random = randomStream(11)
const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())

/** Two methods that read the same truth, rounded to a step or not. */
function methods(n: number, step: number | null): { x: Float64Array; y: Float64Array } {
  const rounded = (value: number) => (step === null ? value : Math.round(value / step) * step)
  const x = new Float64Array(n)
  const y = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    const truth = 100 + 30 * normal()
    x[i] = rounded(truth + 5 * normal())
    y[i] = rounded(3 + 1.05 * truth + 5 * normal())
  }
  return { x, y }
}

describe('Passing–Bablok regression', () => {
  test('finds the line that points without error lie on', () => {
    const x = [3, 1, 4, 15, 9, 26, 5, 35, 8]
    const answer = passingBablokRegression(
      x,
      x.map((v) => 2 + 1.5 * v),
    )
    expect(answer.slope.estimate).toBeCloseTo(1.5, 12)
    expect(answer.intercept.estimate).toBeCloseTo(2, 12)
  })

  test('is undone by exchanging the methods (no ties, slope above 0)', () => {
    for (let round = 0; round < 20; round++) {
      // 42 points give 861 slopes, an odd number: the middle one is one slope, not a mean of two
      const { x, y } = methods(42, null)
      const forth = passingBablokRegression(x, y).slope
      const back = passingBablokRegression(y, x).slope
      expect(forth.estimate! * back.estimate!).toBeCloseTo(1, 10)
      expect(forth.lower! * back.upper!).toBeCloseTo(1, 10)
    }
  })

  test('of three points has a slope but no bounds, and says so', () => {
    const answer = passingBablokRegression([1, 2, 3], [1.1, 1.9, 3.2])
    expect(answer.slope).toMatchObject({ estimate: expect.any(Number), lower: null, upper: null })
    expect(answer.notDefined?.code).toBe('too-few')
  })

  test('refuses points that are all the same, too few and no numbers', () => {
    expectRefusal(() => passingBablokRegression([2, 2, 2], [5, 5, 5]), 'constant')
    expectRefusal(() => passingBablokRegression([1, 2], [1, 2]), 'too-few')
    expectRefusal(() => passingBablokRegression([1, 2, Infinity], [1, 2, 3]), 'non-finite')
    expectRefusal(() => passingBablokRegression([1, 2, 3], [1, 2]), 'unequal-length')
  })
})

describe('slopes selected by counting', () => {
  test('are those of the full list, with ties, vertical pairs and slopes of −1', () => {
    for (const [n, step] of [
      [12, 10],
      [60, null],
      [300, 1],
      [700, 0.1],
      [900, 25],
    ] as const) {
      const { x, y } = methods(n, step)
      const listed = allSlopes(x, y)
      const selected = selectedSlopes(x, y)
      const { slopes, offset, identicalPoints, slopesOfMinusOne } = listed
      expect(selected).toMatchObject({ slopes, offset, identicalPoints, slopesOfMinusOne })
      const share = (part: number) => Math.max(1, Math.round(part * slopes))
      const ranks = [1, 2, offset, offset + 1, share(0.25), share(0.5), share(0.75), slopes].filter(
        (rank) => rank >= 1,
      )
      const expected = listed.at(ranks)
      selected.at(ranks).forEach((slope, k) => {
        if (Number.isFinite(expected[k]!)) expect(slope).toBeCloseTo(expected[k]!, 9)
        else expect(slope).toBe(expected[k])
      })
    }
  })

  test('bear more ties in one slope than are held in memory', () => {
    // steps up and down a staircase of slope 1: five pairs of nine have it exactly
    const n = 4200
    const x = Float64Array.from({ length: n }, (_, i) => i % 40)
    const y = Float64Array.from({ length: n }, (_, i) => (i % 40) + (i % 3 === 0 ? 1 : 0))
    const listed = allSlopes(x, y)
    const answer = passingBablokRegression(x, y)
    expect(answer.slopes).toBe(listed.slopes)
    const middle = listed.slopes / 2 + listed.offset
    const [expected] = listed.at([Math.ceil(middle)])
    expect(answer.slope.estimate).toBeCloseTo(expected!, 9)
  })
})

describe('the parts it is made of', () => {
  const numbers = fc.array(
    fc.oneof(fc.integer({ min: -5, max: 5 }), fc.double({ min: -9e59, max: 9e59, noNaN: true })),
    {
      maxLength: 60,
    },
  )

  test('inversions are the pairs out of order', () => {
    holdsForAll(numbers, (values) => {
      let pairs = 0
      values.forEach((a, i) => {
        pairs += values.slice(i + 1).filter((b) => a > b).length
      })
      expect(countInversions(Float64Array.from(values))).toBe(pairs)
    })
  })

  test('the k-th smallest is the k-th of the sorted values', () => {
    holdsForAll(fc.tuple(numbers, fc.nat()), ([values, k]) => {
      fc.pre(values.length > 0)
      const rank = (k % values.length) + 1
      const sorted = [...values].sort((a, b) => a - b)
      expect(nthSmallest(Float64Array.from(values), rank) === sorted[rank - 1]).toBe(true)
    })
  })

  test('the radix order sorts any doubles, keeps ties in their order and refuses what is no number', () => {
    holdsForAll(numbers, (values) => {
      const order = [...sortedOrder(Float64Array.from(values), 'The values')]
      const expected = values.map((_, i) => i).sort((a, b) => values[a]! - values[b]! || a - b)
      expect(order).toEqual(expected)
    })
    const many = Float64Array.from({ length: 3000 }, (_, i) => Math.round(1e3 * Math.sin(i)) / 10)
    const expected = [...many.keys()].sort((a, b) => many[a]! - many[b]! || a - b)
    expect([...sortedOrder(many, 'The values')]).toEqual(expected)
    expectRefusal(() => sortedOrder(Float64Array.of(1, Number.NaN), 'The values'), 'non-finite')
  })
})
