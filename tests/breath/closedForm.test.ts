import { expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import { expandedUncertainty } from '#shared/breath/session/expandedUncertainty.ts'
import { spreadOf } from '#shared/breath/session/spreadOf.ts'
import { csvOf } from './support/csvOf.ts'
import { expectSixFigures } from './support/sixFigures.ts'

/**
 * 10 Hz, t = 0–14 s, exhaled 2 ≤ t < 12 with s = t − 2 at 50 mL/s:
 * CO2 = 0.04 + 4.8·(1 − e^(−s/0.5)) + 0.04·s, gas = 20 + 480·(1 − e^(−s/1.5)); outside 0.04 %, 20 ppb,
 * no flow. The expected figures follow from these formulas by hand, apart from the code.
 */
const trace = csvOf(
  ['time_s', 'co2_percent', 'flow_ml_s', 'isoprene_ppb'],
  Array.from({ length: 141 }, (_, i) => {
    const s = i / 10 - 2
    if (i < 20 || i >= 120) return [i / 10, 0.04, 0, 20]
    return [
      i / 10,
      0.04 + 4.8 * (1 - Math.exp(-s / 0.5)) + 0.04 * s,
      50,
      20 + 480 * (1 - Math.exp(-s / 1.5)),
    ]
  }),
)

test('the closed-form trace gives its start, window, figures and adjusted values to six figures', async () => {
  const { exhalations, intervalS, samples, analytes } = await readTrace(trace, {
    normalise: ['isoprene'],
    correctDilution: ['isoprene'],
  })
  expect(samples).toBe(141)
  expect(intervalS).toBe(0.1)
  expect(exhalations).toHaveLength(1)
  const exhalation = exhalations[0]!
  const reading = exhalation.readings[0]!
  expectSixFigures(exhalation.endTidalCo2Percent, 5.236)
  expectSixFigures(exhalation.startS, 2.38313)
  expectSixFigures(exhalation.inspiredCo2Percent, 0.04)
  expectSixFigures(exhalation.volumeMl, 500)
  expect(exhalation.volumeBtpsMl).toBeNull()
  expect(exhalation.durationS).toBe(10)
  expect(exhalation.window).toMatchObject({ startS: 9, endS: 12, n: 30 })
  expectSixFigures(exhalation.window?.meanCo2Percent, 5.178)
  expectSixFigures(exhalation.window?.co2SlopePercentPerS, 0.040001)
  expectSixFigures(reading.meanPpb, 497.983)
  expectSixFigures(reading.slopePpbPerS, 1.26281)
  expectSixFigures(reading.changePercent, 0.760758)
  expectSixFigures(reading.normalisedSlopePerL, 0.0507172)
  expectSixFigures(analytes[0]!.roomAirPpb, 20)
  expectSixFigures(reading.gradientPpb, 477.983)
  expectSixFigures(reading.co2Normalised.ppb, 480.864)
  expectSixFigures(reading.dilutionCorrected.ppb, 481.424)
  expect(exhalation.flags).toEqual([])
  expect(exhalation.accepted && reading.accepted).toBe(true)
})

test('the samples at or above half of the maximum run from 2.4 to 11.9 s', async () => {
  const { exhalations } = await readTrace(trace)
  // The last sample at 11.9 s shows 5.236 %, the next one 0.04 %: half of it is passed between them.
  expectSixFigures(exhalations[0]!.endS, 11.9 + (0.1 * 2.618) / (5.236 - 0.04))
})

test('three replicates give mean, median, spread and their uncertainty to six figures', () => {
  // 310, 325, 318 ppb; calibration 5 % (k = 2), step 1 ppb, drift ±1 %, room air 20 ± 2 ppb.
  // Computed by hand by JCGM 100:2008 (GUM).
  const { sd, cvPercent } = spreadOf([310, 325, 318])
  expectSixFigures(sd, 7.50555)
  expectSixFigures(cvPercent, 2.36271)
  const budget = {
    valuePpb: 953 / 3,
    n: 3,
    sdPpb: Math.sqrt(169 / 3),
    calibrationExpandedPercent: 5,
    resolutionPpb: 1,
    driftPercent: 1,
  }
  const found = expandedUncertainty(budget)
  expectSixFigures(found.repeatabilityPpb, 4.33333)
  expectSixFigures(found.calibrationPpb, 7.94167)
  expectSixFigures(found.resolutionPpb, 0.288675)
  expectSixFigures(found.driftPpb, 1.83405)
  expectSixFigures(found.combinedPpb, 9.23552)
  expectSixFigures(found.degreesOfFreedom, 41.2656)
  expectSixFigures(found.expandedPpb, 18.471)
  const withRoomAir = expandedUncertainty({ ...budget, roomAirStandardUncertaintyPpb: 2 })
  expectSixFigures(withRoomAir.combinedPpb, 9.4496)
})

test('readings that do not scatter have no degrees of freedom to state', () => {
  const { degreesOfFreedom, combinedPpb } = expandedUncertainty({
    valuePpb: 100,
    n: 2,
    sdPpb: 0,
    calibrationExpandedPercent: 4,
  })
  expect(degreesOfFreedom).toBeNull()
  expect(combinedPpb).toBe(2)
})
