import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import type { Classes } from '#shared/statistics/accuracy/Classes.ts'
import { clusteredArea } from '#shared/statistics/accuracy/clusteredArea.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { independentAreas } from '#shared/statistics/accuracy/independentAreas.ts'
import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { partialArea } from '#shared/statistics/accuracy/partialArea.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { someClasses } from './support/arbitraries.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

const areaOf = (classes: Classes) => delongArea(rocCurve(classes))

const mapped = (classes: Classes, change: (value: number) => number): Classes => ({
  ...classes,
  present: Array.from(classes.present, change),
  absent: Array.from(classes.absent, change),
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
