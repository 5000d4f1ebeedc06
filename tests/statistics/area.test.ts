import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import type { Classes } from '#shared/statistics/accuracy/Classes.ts'
import { clusteredArea } from '#shared/statistics/accuracy/clusteredArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { independentAreas } from '#shared/statistics/accuracy/independentAreas.ts'
import { mannWhitney } from '#shared/statistics/accuracy/mannWhitney.ts'
import { newcombeAreaInterval } from '#shared/statistics/accuracy/newcombeAreaInterval.ts'
import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { partialArea } from '#shared/statistics/accuracy/partialArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { testAgainstHalf } from '#shared/statistics/accuracy/testAgainstHalf.ts'
import { someClasses, tinyClasses } from './support/arbitraries.ts'
import { everyNumber } from './support/everyNumber.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

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

describe('several sessions of a subject', () => {
  test('with one session each it is DeLong', () => {
    holdsForAll(someClasses, (classes) => {
      const plain = areaOf(classes)
      const clustered = clusteredArea({
        ...classes,
        presentSubjects: Array.from(classes.present, (_, i) => `p${i}`),
        absentSubjects: Array.from(classes.absent, (_, i) => `a${i}`),
      })
      expect(clustered.area).toBeCloseTo(plain.area, 13)
      expect(clustered.variance).toBeCloseTo(plain.variance!, 13)
    })
  })

  test('doubling every session widens nothing and narrows nothing', () => {
    const classes: Classes = { present: [4, 7, 9, 3], absent: [2, 5, 1, 6, 3], direction: 'higher' }
    const subjects = { presentSubjects: [1, 2, 3, 4], absentSubjects: [5, 6, 7, 8, 9] }
    const twice = <T>(values: ArrayLike<T>): T[] => [...Array.from(values), ...Array.from(values)]
    const once = clusteredArea({ ...classes, ...subjects })
    const doubled = clusteredArea({
      direction: 'higher',
      present: twice(classes.present),
      absent: twice(classes.absent),
      presentSubjects: twice(subjects.presentSubjects),
      absentSubjects: twice(subjects.absentSubjects),
    })
    expect(doubled.area).toBeCloseTo(once.area, 14)
    expect(doubled.variance).toBeCloseTo(once.variance!, 14)
    expect(
      areaOf({ ...classes, present: twice(classes.present), absent: twice(classes.absent) })
        .variance,
    ).toBeLessThan(once.variance! * 0.6)
  })

  // Obuchowski 1997, Biometrics 53:567, equations for S10, S01 and S11, written out as sums over subjects
  test('subjects with both outcomes bring Obuchowski’s covariance in', () => {
    const present = [6, 7, 3, 8, 5]
    const presentSubjects = ['a', 'a', 'b', 'c', 'd']
    const absent = [2, 4, 5, 1, 6, 3]
    const absentSubjects = ['a', 'b', 'b', 'e', 'f', 'd']
    const kernel = (p: number, a: number) => (Math.sign(p - a) + 1) / 2
    const theta = mean(present.flatMap((p) => absent.map((a) => kernel(p, a))))
    const ids = [...new Set([...presentSubjects, ...absentSubjects])]
    const total = (id: string) => ({
      x: present.reduce(
        (s, p, i) =>
          s + (presentSubjects[i] === id ? mean(absent.map((a) => kernel(p, a))) - theta : 0),
        0,
      ),
      y: absent.reduce(
        (s, a, j) =>
          s + (absentSubjects[j] === id ? mean(present.map((p) => kernel(p, a))) - theta : 0),
        0,
      ),
    })
    const sums = ids.map(total)
    const s10 = (4 / (3 * 5)) * sums.reduce((s, { x }) => s + x * x, 0)
    const s01 = (5 / (4 * 6)) * sums.reduce((s, { y }) => s + y * y, 0)
    const s11 = (6 / 5) * sums.reduce((s, { x, y }) => s + x * y, 0)
    const answer = clusteredArea({
      present,
      absent,
      presentSubjects,
      absentSubjects,
      direction: 'higher',
    })
    expect(answer).toMatchObject({ subjects: 6, subjectsPresent: 4, subjectsAbsent: 5 })
    expect(answer.variance).toBeCloseTo(s10 / 5 + s01 / 6 + (2 * s11) / 30, 14)
  })
})

describe('comparing areas', () => {
  test('identical curves give a difference of 0 and p = 1', () => {
    holdsForAll(someClasses, (classes) => {
      const same = mapped(classes, (value) => 3 * value)
      expect(pairedDelong(classes, same)).toMatchObject({ difference: 0, z: 0, p: 1 })
    })
  })

  test('swapping the two markers only turns the sign', () => {
    holdsForAll(
      fc.array(
        fc.tuple(fc.integer({ min: 0, max: 9 }), fc.integer({ min: 0, max: 9 }), fc.boolean()),
        {
          minLength: 6,
          maxLength: 40,
        },
      ),
      (rows) => {
        const side = (column: 0 | 1): Classes => ({
          present: rows.filter((row) => row[2]).map((row) => row[column]),
          absent: rows.filter((row) => !row[2]).map((row) => row[column]),
          direction: 'higher',
        })
        fc.pre(side(0).present.length > 1 && side(0).absent.length > 1)
        const forth = pairedDelong(side(0), side(1))
        const back = pairedDelong(side(1), side(0))
        expect(back.difference).toBeCloseTo(-forth.difference, 14)
        expect(back.p ?? -1).toBeCloseTo(forth.p ?? -1, 12)
      },
    )
  })

  test('a group compared with itself does not differ', () => {
    const curve = rocCurve({ present: [3, 4, 8], absent: [1, 2, 5], direction: 'higher' })
    expect(independentAreas(curve, curve)).toMatchObject({ difference: 0, statistic: 0, pT: 1 })
  })
})

describe('refusals', () => {
  test('one class only', () => {
    expectRefusal(() => rocCurve({ present: [], absent: [1], direction: 'higher' }), 'one-class')
    expectRefusal(() => rocCurve({ present: [1], absent: [], direction: 'higher' }), 'one-class')
  })
  test('something that is not a finite number', () => {
    for (const bad of [Number.NaN, Infinity, -Infinity]) {
      expectRefusal(
        () => rocCurve({ present: [1, bad], absent: [1], direction: 'higher' }),
        'non-finite',
      )
    }
  })
  test('markers of different subjects, and too few subjects for a comparison', () => {
    const few: Classes = { present: [1, 2], absent: [0, 1], direction: 'higher' }
    expectRefusal(() => pairedDelong(few, { ...few, absent: [1] }), 'unequal-length')
    expectRefusal(() => pairedDelong({ ...few, present: [1] }, { ...few, present: [1] }), 'too-few')
  })
  test('a level or range that is none', () => {
    const curve = rocCurve({ present: [1, 2], absent: [0, 1], direction: 'higher' })
    expectRefusal(() => delongArea(curve, { level: 1 }), 'out-of-range')
    expectRefusal(() => partialArea(curve, { from: 0.9, to: 0.9 }), 'out-of-range')
  })
  test('sessions without their subjects', () => {
    expectRefusal(
      () =>
        clusteredArea({
          present: [1, 2],
          absent: [0],
          presentSubjects: ['a'],
          absentSubjects: ['b'],
          direction: 'higher',
        }),
      'unequal-length',
    )
  })
})

function mean(values: number[]): number {
  return values.reduce((a, b) => a + b, 0) / values.length
}

function variance(values: number[]): number {
  const centre = mean(values)
  return values.reduce((s, v) => s + (v - centre) ** 2, 0) / (values.length - 1)
}
