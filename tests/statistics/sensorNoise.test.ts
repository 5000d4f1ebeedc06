import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { areaBelowDetection } from '#shared/statistics/sensor/areaBelowDetection.ts'
import { correctedArea } from '#shared/statistics/sensor/correctedArea.ts'
import { expectedArea } from '#shared/statistics/sensor/expectedArea.ts'
import { replicatesForReliability } from '#shared/statistics/sensor/replicatesForReliability.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'
import { toSixFigures } from './support/toSixFigures.ts'

describe('how sensor noise moves the area', () => {
  const sensor = { meanPresent: 1.5, meanAbsent: 0, sdPresent: 1, sdAbsent: 1, sdReading: 1 }

  test('meets the worked areas and sensitivities for equal spreads', () => {
    const at = (replicates: number) => expectedArea({ ...sensor, replicates })
    toSixFigures(at(1).trueArea, 0.855578)
    const printed = [
      [1, 0.773373],
      [2, 0.806762],
      [3, 0.820837],
      [10, 0.844064],
    ] as const
    for (const [m, area] of printed) toSixFigures(at(m).observedArea, area)
    toSixFigures(at(1).trueSensitivity, 0.58646)
    toSixFigures(at(1).observedSensitivity, 0.412588)
    toSixFigures(at(3).observedSensitivity, 0.506976)
  })

  test('meets the worked areas for unequal spreads', () => {
    const gas = { meanPresent: 100, meanAbsent: 0, sdPresent: 60, sdAbsent: 40, sdReading: 30 }
    const printed = [0.884001, 0.899792, 0.905419]
    printed.forEach((area, i) => {
      toSixFigures(expectedArea({ ...gas, replicates: i + 1 }).observedArea, area)
    })
    toSixFigures(expectedArea({ ...gas, replicates: 1 }).trueArea, 0.917241)
  })

  test('is undone by the correction, whatever the spreads', () => {
    holdsForAll(
      fc.tuple(
        fc.double({ min: 0.2, max: 2, noNaN: true }),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
      ),
      ([sdReading, sdPresent]) => {
        const noisy = { ...sensor, sdReading, sdPresent, replicates: 2 }
        const { trueArea, observedArea } = expectedArea(noisy)
        const errorVariance = sdReading ** 2 / 2
        const corrected = correctedArea(observedArea, {
          observedVariancePresent: sdPresent ** 2 + errorVariance,
          observedVarianceAbsent: 1 + errorVariance,
          errorVariance,
        })
        expect(corrected).toBeCloseTo(trueArea, 10)
      },
    )
  })

  test('meets the worked reliabilities', () => {
    toSixFigures(correctedArea(0.8, { reliability: 0.7 }), 0.842775)
    toSixFigures(correctedArea(0.874155, { reliability: 0.8 }), 0.9)
    toSixFigures(correctedArea(0.817583, { reliability: 0.5 }), 0.9)
    const { exact, replicates } = replicatesForReliability(0.7, 0.9)
    toSixFigures(exact, 3.85714)
    expect(replicates).toBe(4)
  })

  test('day-to-day spread is not averaged away by replicates of one session', () => {
    const daily = { ...sensor, sdReading: 0, sdDay: 1 }
    expect(expectedArea({ ...daily, replicates: 50 }).observedArea).toBeCloseTo(
      expectedArea({ ...sensor, replicates: 1 }).observedArea,
      12,
    )
  })

  test('an impossible error or reliability is refused', () => {
    expectRefusal(() => correctedArea(0.8, { reliability: 0 }), 'out-of-range')
    expectRefusal(() => correctedArea(1, { reliability: 0.7 }), 'out-of-range')
    const variances = { observedVariancePresent: 1, observedVarianceAbsent: 1, errorVariance: 1 }
    expectRefusal(() => correctedArea(0.8, variances), 'out-of-range')
    expectRefusal(() => expectedArea({ ...sensor, replicates: 0 }), 'out-of-range')
  })
})

test('values below detection: ties keep nearly all of the area, dropped rows lose it', () => {
  const printed = [
    [-0.6744897501960817, 0.855007, 0.821333, 0.0148],
    [0, 0.849305, 0.784418, 0.0668],
    [0.6744897501960817, 0.820372, 0.739573, 0.205],
    [1.2815515655446004, 0.754991, 0.700546, 0.414],
  ] as const
  for (const [limit, tied, dropped, censored] of printed) {
    const answer = areaBelowDetection({
      meanPresent: 1.5,
      meanAbsent: 0,
      sdPresent: 1,
      sdAbsent: 1,
      limit,
    })
    toSixFigures(answer.tied, tied)
    toSixFigures(answer.dropped, dropped)
    expect(answer.shareCensoredPresent).toBeCloseTo(censored, 3)
  }
})
