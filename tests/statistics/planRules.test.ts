import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { holmAdjustment } from '#shared/statistics/accuracy/holmAdjustment.ts'
import { successCriterion } from '#shared/statistics/accuracy/successCriterion.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

describe('what the plan decides beforehand', () => {
  // R 4.2.2 p.adjust(c(0.01, 0.04, 0.03, 0.005), "holm") = 0.03 0.06 0.06 0.02, from memory of its help
  test('Holm’s adjustment steps down', () => {
    expect(holmAdjustment([0.01, 0.04, 0.03, 0.005])).toEqual([
      expect.closeTo(0.03, 12),
      expect.closeTo(0.06, 12),
      expect.closeTo(0.06, 12),
      expect.closeTo(0.02, 12),
    ])
    expect(holmAdjustment([0.4])).toEqual([0.4])
    expectRefusal(() => holmAdjustment([1.2]), 'out-of-range')
  })

  test('Holm’s adjustment never lowers a p value nor changes their order', () => {
    holdsForAll(
      fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: 8 }),
      (p) => {
        const adjusted = holmAdjustment(p)
        p.forEach((value, i) => {
          expect(adjusted[i]).toBeGreaterThanOrEqual(value)
          p.forEach((other, j) => {
            if (value < other) expect(adjusted[i]).toBeLessThanOrEqual(adjusted[j]!)
          })
        })
      },
    )
  })

  test('a co-primary criterion is met only when every lower end lies above its floor', () => {
    const sensitivity = {
      measure: 'sensitivity' as const,
      floor: 0.7,
      estimate: 0.85,
      lower: 0.76,
    }
    const specificity = {
      measure: 'specificity' as const,
      floor: 0.6,
      estimate: 0.7,
      lower: 0.6,
    }
    expect(successCriterion([sensitivity]).met).toBe(true)
    expect(successCriterion([sensitivity, specificity])).toMatchObject({
      met: false,
      parts: [{ met: true }, { met: false }],
    })
    expect(successCriterion([{ ...sensitivity, lower: null }]).met).toBe(false)
    expectRefusal(() => successCriterion([]), 'too-few')
  })
})
