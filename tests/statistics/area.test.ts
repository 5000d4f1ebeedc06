import { describe, expect, test } from 'vitest'
import type { Classes } from '#shared/statistics/accuracy/Classes.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { independentAreas } from '#shared/statistics/accuracy/independentAreas.ts'
import { mannWhitney } from '#shared/statistics/accuracy/mannWhitney.ts'
import { newcombeAreaInterval } from '#shared/statistics/accuracy/newcombeAreaInterval.ts'
import { partialArea } from '#shared/statistics/accuracy/partialArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { testAgainstHalf } from '#shared/statistics/accuracy/testAgainstHalf.ts'
import { someClasses, tinyClasses } from './support/arbitraries.ts'
import { everyNumber } from './support/everyNumber.ts'
import { holdsForAll } from './support/holdsForAll.ts'

const areaOf = (classes: Classes) => delongArea(rocCurve(classes))

const mapped = (classes: Classes, change: (value: number) => number): Classes => ({
  ...classes,
  present: Array.from(classes.present, change),
  absent: Array.from(classes.absent, change),
})

const opposite = { higher: 'lower', lower: 'higher' } as const

describe('the area under the curve', () => {
  test('is the share of pairs ordered rightly, ties one half', () => {
    holdsForAll(tinyClasses, (classes) => {
      const sign = classes.direction === 'higher' ? 1 : -1
      let wins = 0
      for (const p of Array.from(classes.present)) {
        for (const a of Array.from(classes.absent)) {
          if (sign * p > sign * a) wins += 1
          else if (p === a) wins += 0.5
        }
      }
      const share = wins / (classes.present.length * classes.absent.length)
      expect(areaOf(classes).area).toBeCloseTo(share, 12)
    })
  })

  test('stays the same under a strictly increasing change of scale', () => {
    holdsForAll(someClasses, (classes) => {
      const { area, variance } = areaOf(classes)
      // doubling and moving by whole numbers keeps ties and order exactly
      const other = areaOf(mapped(classes, (value) => 2 * value))
      expect(other.area).toBe(area)
      expect(other.variance).toBe(variance)
    })
  })

  test('stays the same when classes and direction are swapped, and mirrors when one of them is', () => {
    holdsForAll(someClasses, ({ present, absent, direction }) => {
      const plain = areaOf({ present, absent, direction })
      const both = areaOf({ present: absent, absent: present, direction: opposite[direction] })
      const one = areaOf({ present, absent, direction: opposite[direction] })
      expect(both.area).toBeCloseTo(plain.area, 14)
      expect(both.variance).toBeCloseTo(plain.variance!, 14)
      expect(one.area).toBeCloseTo(1 - plain.area, 14)
      expect(one.variance).toBeCloseTo(plain.variance!, 14)
    })
  })

  test('has DeLong’s variance as its definition gives it', () => {
    holdsForAll(someClasses, (classes) => {
      const sign = classes.direction === 'higher' ? 1 : -1
      const kernel = (p: number, a: number) => (Math.sign(sign * (p - a)) + 1) / 2
      const present = Array.from(classes.present)
      const absent = Array.from(classes.absent)
      const v10 = present.map((p) => mean(absent.map((a) => kernel(p, a))))
      const v01 = absent.map((a) => mean(present.map((p) => kernel(p, a))))
      const expected = variance(v10) / present.length + variance(v01) / absent.length
      expect(areaOf(classes).variance).toBeCloseTo(expected, 12)
    })
  })

  test('never gives NaN or an infinity, whatever the classes', () => {
    holdsForAll(tinyClasses, (classes) => {
      const curve = rocCurve(classes)
      const answers = [
        delongArea(curve),
        delongArea(curve, { scale: 'logit' }),
        testAgainstHalf(delongArea(curve)),
        mannWhitney(curve),
        partialArea(curve, { from: 0.8, to: 1 }),
        independentAreas(curve, curve),
      ]
      expect(everyNumber(answers).filter(({ value }) => !Number.isFinite(value))).toEqual([])
    })
  })

  test('shows an interval that holds the area and stays in 0…1', () => {
    holdsForAll(tinyClasses, (classes) => {
      const { area, shown } = areaOf(classes)
      expect(shown.lower).toBeLessThanOrEqual(area + 1e-12)
      expect(shown.upper).toBeGreaterThanOrEqual(area - 1e-12)
      expect(shown.lower).toBeGreaterThanOrEqual(0)
      expect(shown.upper).toBeLessThanOrEqual(1)
    })
  })

  test('leaves its input as it was', () => {
    const present = Float64Array.of(3, 1, 2)
    const absent = [5, 0, 1]
    rocCurve({ present, absent, direction: 'higher' })
    expect([...present, ...absent]).toEqual([3, 1, 2, 5, 0, 1])
  })
})

describe('where DeLong’s variance says nothing', () => {
  test('perfect separation is named and shown with Newcombe’s interval', () => {
    const answer = areaOf({ present: [5, 6, 7], absent: [1, 2, 3, 4], direction: 'higher' })
    expect(answer).toMatchObject({ area: 1, variance: 0, notEstimable: { code: 'zero-variance' } })
    expect(answer.shown.method).toBe('Newcombe, method 5')
    expect(answer.shown.upper).toBe(1)
    expect(answer.shown.lower).toBeGreaterThan(0.4)
    expect(answer.shown.lower).toBeLessThan(0.7)
    expect(testAgainstHalf(answer)).toMatchObject({ z: null, p: null })
  })

  test('a constant marker, even a long one, has area 0.5 and a variance of exactly 0', () => {
    const answer = areaOf({
      present: new Float64Array(70_001).fill(0.1),
      absent: new Float64Array(33_333).fill(0.1),
      direction: 'lower',
    })
    expect(answer).toMatchObject({
      area: 0.5,
      variance: 0,
      notEstimable: { code: 'zero-variance' },
    })
  })

  test('a single subject in a class leaves the variance open', () => {
    const answer = areaOf({ present: [5], absent: [1, 2, 9], direction: 'higher' })
    expect(answer).toMatchObject({ variance: null, plain: null, notEstimable: { code: 'too-few' } })
    expect(answer.shown.method).toBe('Newcombe, method 5')
  })

  // Newcombe 2006, Stat Med 25:559, method 5: the ends solve (area − θ)² = z²·V(θ); formula from memory
  test('Newcombe’s ends solve his score equation', () => {
    const z = 1.959963984540054
    for (const [area, m, n] of [
      [1, 3, 4],
      [0.8, 20, 35],
      [0.5, 7, 7],
      [0, 12, 5],
    ] as const) {
      const v = (t: number) =>
        (t * (1 - t) * (1 + ((m + n) / 2 - 1) * ((1 - t) / (2 - t) + t / (1 + t)))) / (m * n)
      const { lower, upper } = newcombeAreaInterval({ area, nPresent: m, nAbsent: n })
      if (area > 0) expect(area - lower).toBeCloseTo(z * Math.sqrt(v(lower)), 10)
      else expect(lower).toBe(0)
      if (area < 1) expect(upper - area).toBeCloseTo(z * Math.sqrt(v(upper)), 10)
      else expect(upper).toBe(1)
    }
  })
})

function mean(values: number[]): number {
  return values.reduce((a, b) => a + b, 0) / values.length
}

function variance(values: number[]): number {
  const centre = mean(values)
  return values.reduce((s, v) => s + (v - centre) ** 2, 0) / (values.length - 1)
}
