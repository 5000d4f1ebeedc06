import fc from 'fast-check'
import { expect, test } from 'vitest'
import { floorPower } from '#shared/statistics/planning/floorPower.ts'
import { floorSampleSize } from '#shared/statistics/planning/floorSampleSize.ts'
import { proportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'

/** From scipy 1.17.1 by tests/statistics/references/floor_sample_size.py. */
test.each([
  [{ expected: 0.9, floor: 0.8, power: 0.9 }, 130, 142, 123, 0.9259901614201103],
  [{ expected: 0.9, floor: 0.75, power: 0.95 }, 78, 88, 74, 0.9721994786656131],
  [
    { expected: 0.9, floor: 0.75, power: 0.95, interval: 'Clopper–Pearson' as const },
    85,
    89,
    75,
    0.9695553038792096,
  ],
  // Flahault 2005 prints 70 for this plan (one-sided 5 %, from memory); Chu & Cole 2007 note that 71 to
  // 73 then fall short of the power, which is why the size to plan by is 74.
  [
    { expected: 0.9, floor: 0.75, power: 0.95, level: 0.9, interval: 'Clopper–Pearson' as const },
    70,
    74,
    62,
    0.9688877636764143,
  ],
])(
  'a floor under a proportion needs as many subjects as a plain search finds: %o',
  (plan, first, n, least, power) => {
    const size = floorSampleSize(plan)
    expect(size).toMatchObject({ firstToReach: first, n, least })
    expect(size.power).toBeCloseTo(power, 12)
  },
)

test('the power is the chance of a count whose interval clears the floor, summed one by one', () => {
  holdsForAll(
    fc.record({
      floor: fc.double({ min: 0.3, max: 0.7, noNaN: true }),
      above: fc.double({ min: 0.05, max: 0.25, noNaN: true }),
      n: fc.integer({ min: 1, max: 60 }),
    }),
    ({ floor, above, n }) => {
      const expected = floor + above
      let chance = (1 - expected) ** n
      let sum = 0
      for (let x = 0; x <= n; x++) {
        if (proportionEstimate(x, n).lower! > floor) sum += chance
        chance *= ((n - x) / (x + 1)) * (expected / (1 - expected))
      }
      expect(floorPower({ expected, floor }, n).power).toBeCloseTo(sum, 9)
    },
  )
})

test('a plan that no sample meets is refused', () => {
  expectRefusal(() => floorPower({ expected: 0.8, floor: 0.8 }, 50), 'out-of-range')
  expectRefusal(() => floorPower({ expected: 1, floor: 0.8 }, 50), 'out-of-range')
  expectRefusal(() => floorPower({ expected: 0.9, floor: 0.8 }, 0), 'out-of-range')
  expectRefusal(() => floorSampleSize({ expected: 0.8, floor: 0.9, power: 0.9 }), 'out-of-range')
  expectRefusal(() => floorSampleSize({ expected: 0.9, floor: 0.8999, power: 0.9 }), 'out-of-range')
})

test('a long search tells how far it is and can be cancelled', () => {
  const shares: number[] = []
  const plan = { expected: 0.9, floor: 0.88, power: 0.9 }
  floorSampleSize(plan, { onProgress: (share) => shares.push(share) })
  expect(shares.length).toBeGreaterThan(3)
  expect(shares.every((share, at) => share <= 1 && share > (shares[at - 1] ?? 0))).toBe(true)
  const stop = () => {
    throw new Error('stopped')
  }
  expect(() => floorSampleSize(plan, { onProgress: stop })).toThrow('stopped')
})
