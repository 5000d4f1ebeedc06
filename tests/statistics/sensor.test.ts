import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { allanDeviation } from '#shared/statistics/sensor/allanDeviation.ts'
import { allanMinimum } from '#shared/statistics/sensor/allanMinimum.ts'
import { backCalculated } from '#shared/statistics/sensor/backCalculated.ts'
import { calibrationLine } from '#shared/statistics/sensor/calibrationLine.ts'
import { detectionLimits } from '#shared/statistics/sensor/detectionLimits.ts'
import { expandedUncertainty } from '#shared/statistics/sensor/expandedUncertainty.ts'
import { inversePrediction } from '#shared/statistics/sensor/inversePrediction.ts'
import { limitOfBlank } from '#shared/statistics/sensor/limitOfBlank.ts'
import { holdsForAll } from './support/holdsForAll.ts'
import { expectRefusal } from './support/refusal.ts'
import { toSixFigures } from './support/toSixFigures.ts'

describe('a calibration line', () => {
  const standards = {
    levels: [0, 100, 250, 500, 1000, 2000],
    signals: [0.8, 20.9, 50.7, 101.5, 199.8, 401],
  }
  const line = calibrationLine(standards)

  test('meets the worked slope, intercept, scatter and limits', () => {
    toSixFigures(line.slope, 0.19993)
    toSixFigures(line.intercept, 0.828517)
    toSixFigures(line.residualSd, 0.619312)
    const { fromResidualSd } = detectionLimits(line)
    toSixFigures(fromResidualSd.detection, 10.2223)
    toSixFigures(fromResidualSd.quantitation, 30.9765)
  })

  test('meets the worked inverse prediction of a mean of three signals', () => {
    const answer = inversePrediction(line, { meanSignal: 81, readings: 3 })
    toSixFigures(answer.level, 400.999)
    toSixFigures(answer.standardError, 2.23441)
    expect(answer.fieller!.lower).toBeLessThan(answer.level)
    expect(answer.fieller!.upper).toBeGreaterThan(answer.level)
  })

  test('gives back its own levels where the points lie on it, however weighted', () => {
    const exact = { levels: [10, 20, 40, 80], signals: [7, 12, 22, 42] }
    for (const weights of ['none', '1/x', '1/x²'] as const) {
      const fitted = calibrationLine(exact, { weights })
      expect(fitted.slope).toBeCloseTo(0.5, 12)
      for (const { level, mean } of backCalculated(exact, fitted))
        expect(mean).toBeCloseTo(level, 10)
    }
  })

  test('without replicates says why there is no test for lack of fit', () => {
    expect(line.lackOfFit).toBeNull()
    expect(line.lackOfFitNotDefined?.code).toBe('too-few')
  })

  test('that does not rise has no bounded level', () => {
    const flat = calibrationLine({ levels: [1, 2, 3, 4], signals: [5, 4.9, 5.2, 5] })
    expect(inversePrediction(flat, { meanSignal: 5.1, readings: 1 })).toMatchObject({
      fieller: null,
      notDefined: { code: 'unbounded' },
    })
  })

  test('refuses a zero standard with weights, equal levels and too few readings', () => {
    expectRefusal(() => calibrationLine(standards, { weights: '1/x' }), 'not-positive')
    expectRefusal(() => calibrationLine({ levels: [5, 5, 5], signals: [1, 2, 3] }), 'constant')
    expectRefusal(() => calibrationLine({ levels: [5, 6], signals: [1, 2] }), 'too-few')
    expectRefusal(
      () => inversePrediction(line, { meanSignal: Number.NaN, readings: 1 }),
      'non-finite',
    )
    expectRefusal(() => inversePrediction(line, { meanSignal: 1, readings: 0 }), 'out-of-range')
    expectRefusal(() => detectionLimits({ ...line, slope: 0 }), 'constant')
  })
})

test('limits of blank and detection meet the worked figures, plain and for small samples', () => {
  const answer = limitOfBlank(
    [1.2, -0.8, 0.5, 2.1, -1.5, 0.3, 1, -0.2, 0.9, -0.5],
    [9.1, 11.4, 10.2, 12, 8.3, 10.9, 9.7, 11.1, 10.5, 9.9],
  )
  toSixFigures(answer.blank.sd, 1.06875)
  toSixFigures(3 * answer.blank.sd, 3.20624)
  toSixFigures(answer.low.sd, 1.11101)
  toSixFigures(answer.limitOfBlank, 2.05809)
  toSixFigures(answer.limitOfDetection, 3.88569)
  toSixFigures(answer.limitOfBlankBothSmallSample, 2.10832)
  toSixFigures(answer.limitOfDetectionBothSmallSample, 3.98814)
  expectRefusal(() => limitOfBlank([1], [1, 2]), 'too-few')
})

describe('the Allan deviation', () => {
  const nine = [892, 809, 823, 798, 671, 644, 883, 903, 677]

  // NIST SP 1065 (Riley 2008), table 31: nine readings
  test('meets the published values for nine readings', () => {
    const plain = allanDeviation(nine, { overlapping: false, lengths: [1, 2] })
    toSixFigures(plain[0]!.deviation, 91.2294)
    toSixFigures(plain[1]!.deviation, 115.808)
    toSixFigures(allanDeviation(nine, { lengths: [2] })[0]!.deviation, 85.9529)
  })

  // NIST SP 1065, table 32: x(i+1) = 16807·x(i) mod 2³¹ − 1 from 1234567890, divided by 2³¹ − 1
  test('meets the published values for the thousand-point test set', () => {
    const series: number[] = []
    let state = 1234567890
    for (let i = 0; i < 1000; i++) {
      series.push(state / 2147483647)
      state = (16807 * state) % 2147483647
    }
    const deviations = (overlapping: boolean) =>
      allanDeviation(series, { overlapping, lengths: [1, 10, 100] }).map((p) => p.deviation)
    const printed = {
      plain: [0.292232, 0.0996574, 0.038978],
      overlapping: [0.292232, 0.0915995, 0.0324134],
    }
    for (const [i, value] of deviations(false).entries()) toSixFigures(value, printed.plain[i]!)
    for (const [i, value] of deviations(true).entries()) {
      toSixFigures(value, printed.overlapping[i]!)
    }
  })

  test('does not see a constant offset, and scales with the readings', () => {
    holdsForAll(
      fc.array(fc.integer({ min: -50, max: 50 }), { minLength: 3, maxLength: 60 }),
      (readings) => {
        const plain = allanDeviation(readings)
        const moved = allanDeviation(readings.map((v) => 1000 + 3 * v))
        plain.forEach(({ deviation }, i) => {
          expect(moved[i]!.deviation).toBeCloseTo(3 * deviation, 8)
        })
      },
    )
  })

  test('has its minimum where it is smallest', () => {
    const points = allanDeviation(nine)
    const smallest = Math.min(...points.map((p) => p.deviation))
    expect(allanMinimum(points).deviation).toBe(smallest)
    expectRefusal(() => allanMinimum([]), 'too-few')
  })

  test('refuses a series too short, lengths that do not fit and readings that are no numbers', () => {
    expectRefusal(() => allanDeviation([1, 2]), 'too-few')
    expectRefusal(() => allanDeviation(nine, { lengths: [5] }), 'out-of-range')
    expectRefusal(() => allanDeviation(nine, { lengths: [1.5] }), 'out-of-range')
    expectRefusal(() => allanDeviation([1, Number.NaN, 2]), 'non-finite')
  })
})

describe('the expanded uncertainty of a session', () => {
  const budget = { calibrationPercent: 5, resolution: 1, driftPercent: 1 }

  test('meets the worked budget', () => {
    const answer = expandedUncertainty([310, 325, 318], budget)
    toSixFigures(answer.value, 317.667)
    toSixFigures(answer.repeatability, 4.33333)
    toSixFigures(answer.calibration, 7.94167)
    toSixFigures(answer.resolution, 0.288675)
    toSixFigures(answer.drift, 1.83405)
    toSixFigures(answer.combined, 9.23552)
    toSixFigures(answer.degreesOfFreedom!, 41.2656)
    toSixFigures(answer.expanded, 18.471)
  })

  test('takes room air off the value and adds its uncertainty', () => {
    const ambient = { mean: 20, standardUncertainty: 2 }
    const answer = expandedUncertainty([310, 325, 318], { ...budget, ambient })
    toSixFigures(answer.value, 297.667)
    toSixFigures(answer.combined, 9.4496)
  })

  test('of exhalations that do not differ has no degrees of freedom to count', () => {
    expect(expandedUncertainty([5, 5], budget).degreesOfFreedom).toBeNull()
    expectRefusal(() => expandedUncertainty([5], budget), 'too-few')
    expectRefusal(() => expandedUncertainty([5, 6], { ...budget, resolution: -1 }), 'out-of-range')
  })
})
