import { describe, expect, test } from 'vitest'
import { limitsOfAgreement } from '#shared/statistics/agreement/limitsOfAgreement.ts'
import { repeatability } from '#shared/statistics/agreement/repeatability.ts'
import { replicateLimitsConstant } from '#shared/statistics/agreement/replicateLimitsConstant.ts'
import { replicateLimitsVarying } from '#shared/statistics/agreement/replicateLimitsVarying.ts'
import { everyNumber } from './support/everyNumber.ts'
import { expectRefusal } from './support/refusal.ts'

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
