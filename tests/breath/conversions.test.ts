import { expect, test } from 'vitest'
import { btpsFactor } from '#shared/breath/conversions/btpsFactor.ts'
import { calibratedPpb } from '#shared/breath/conversions/calibratedPpb.ts'
import { detunedResponse } from '#shared/breath/conversions/detunedResponse.ts'
import { detuningForLossHz } from '#shared/breath/conversions/detuningForLossHz.ts'
import { dilutionCorrectedPpb } from '#shared/breath/conversions/dilutionCorrectedPpb.ts'
import { dryMixingRatioPpb } from '#shared/breath/conversions/dryMixingRatioPpb.ts'
import { dryPercentOfMmHg } from '#shared/breath/conversions/dryPercentOfMmHg.ts'
import { firstOrderRiseS } from '#shared/breath/conversions/firstOrderRiseS.ts'
import { humidPercentOfMmHg } from '#shared/breath/conversions/humidPercentOfMmHg.ts'
import { kpaOfCmH2o } from '#shared/breath/conversions/kpaOfCmH2o.ts'
import { kpaOfMmHg } from '#shared/breath/conversions/kpaOfMmHg.ts'
import { massConcentrationUgM3 } from '#shared/breath/conversions/massConcentrationUgM3.ts'
import { mixingRatioPpb } from '#shared/breath/conversions/mixingRatioPpb.ts'
import { molarVolumeL } from '#shared/breath/conversions/molarVolumeL.ts'
import { noiseEquivalentAbsorption } from '#shared/breath/conversions/noiseEquivalentAbsorption.ts'
import { normalisedToCo2Ppb } from '#shared/breath/conversions/normalisedToCo2Ppb.ts'
import { outputPlS } from '#shared/breath/conversions/outputPlS.ts'
import { percentOfMean } from '#shared/breath/conversions/percentOfMean.ts'
import { permeationPpb } from '#shared/breath/conversions/permeationPpb.ts'
import { relaxationResponse } from '#shared/breath/conversions/relaxationResponse.ts'
import { resonanceBandwidthHz } from '#shared/breath/conversions/resonanceBandwidthHz.ts'
import { ringDownS } from '#shared/breath/conversions/ringDownS.ts'
import { saturationPressureAntoineKpa } from '#shared/breath/conversions/saturationPressureAntoineKpa.ts'
import { saturationPressureKpa } from '#shared/breath/conversions/saturationPressureKpa.ts'
import { saturationPressureSonntagKpa } from '#shared/breath/conversions/saturationPressureSonntagKpa.ts'
import { saturationPressureWagnerPrussKpa } from '#shared/breath/conversions/saturationPressureWagnerPrussKpa.ts'
import { stpdFactor } from '#shared/breath/conversions/stpdFactor.ts'
import { tuningForkFrequencyHz } from '#shared/breath/conversions/tuningForkFrequencyHz.ts'
import { expectSixFigures } from './support/sixFigures.ts'

// Where a row names no publication, its answer was computed by hand from the formula, apart from this
// code. Saturation pressures, BTPS factors and mmHg agree with published tables to the digits printed there.

type Check = [what: string, value: number, expected: number]

const MOLAR_MASS = { ammonia: 17.031, acetone: 58.08, isoprene: 68.119, no: 30.006, co: 28.01 }
const SATURATED = saturationPressureKpa
const PRONG = { thicknessMm: 0.6, elasticModulusGpa: 78.7, densityKgM3: 2649 }

const gases: Check[] = [
  // 22.4140 L/mol at 0 °C and 1 atm: CODATA 2018.
  ['molar volume at 0 °C', molarVolumeL(0), 22.414],
  ['molar volume at 20 °C', molarVolumeL(20), 24.0551],
  ['molar volume at 25 °C', molarVolumeL(25), 24.4654],
  ['molar volume at 37 °C', molarVolumeL(37), 25.4501],
  ['1000 ppb ammonia, 25 °C', massConcentrationUgM3(1000, MOLAR_MASS.ammonia, 25), 696.126],
  ['1000 ppb ammonia, 20 °C', massConcentrationUgM3(1000, MOLAR_MASS.ammonia, 20), 707.999],
  ['1000 ppb ammonia, 0 °C', massConcentrationUgM3(1000, MOLAR_MASS.ammonia, 0), 759.839],
  [
    '1000 ppb ammonia, 25 °C, 100 kPa',
    massConcentrationUgM3(1000, MOLAR_MASS.ammonia, 25, 100),
    687.023,
  ],
  ['18 mg/m³ ammonia in ppm', mixingRatioPpb(18_000, MOLAR_MASS.ammonia, 25) / 1000, 25.8574],
  ['100 ppb acetone', massConcentrationUgM3(100, MOLAR_MASS.acetone, 25), 237.396],
  ['100 ppb isoprene', massConcentrationUgM3(100, MOLAR_MASS.isoprene, 25), 278.43],
  ['100 ppb nitric oxide', massConcentrationUgM3(100, MOLAR_MASS.no, 25), 122.647],
  ['100 ppb carbon monoxide', massConcentrationUgM3(100, MOLAR_MASS.co, 25), 114.488],
]

const humidity: Check[] = [
  // WMO-No. 8; Antoine, Sonntag 1994, Wagner & Pruss 1993 (coefficients of the three from memory).
  ['e(37 °C), WMO', saturationPressureKpa(37), 6.26531],
  ['e(37 °C), Antoine', saturationPressureAntoineKpa(37), 6.25993],
  ['e(37 °C), Sonntag', saturationPressureSonntagKpa(37), 6.28254],
  ['e(37 °C), Wagner and Pruss', saturationPressureWagnerPrussKpa(37), 6.28238],
  ['e(20 °C), WMO', saturationPressureKpa(20), 2.3326],
  ['e(20 °C), Sonntag', saturationPressureSonntagKpa(20), 2.33925],
  // Published tables print 1.102 and 1.091 for 20 and 22 °C (Johns 2004, from memory).
  ['BTPS from 20 °C', btpsFactor(20, SATURATED(20)), 1.10176],
  ['BTPS from 22 °C', btpsFactor(22, SATURATED(22)), 1.09093],
  ['BTPS from 25 °C', btpsFactor(25, SATURATED(25)), 1.07423],
  ['BTPS from 30 °C', btpsFactor(30, SATURATED(30)), 1.04496],
  ['BTPS from 20 °C at half humidity', btpsFactor(20, SATURATED(20) / 2), 1.11474],
  ['0.5 L at 22 °C in L BTPS', 0.5 * btpsFactor(22, SATURATED(22)), 0.545463],
  ['STPD from 25 °C', stpdFactor(25, SATURATED(25)), 0.887577],
  ['STPD from 37 °C', stpdFactor(37, SATURATED(37)), 0.826246],
  ['500 ppb humid, dry', dryMixingRatioPpb(500, SATURATED(37)), 532.955],
  ['40 mmHg in kPa', kpaOfMmHg(40), 5.33289],
  ['40 mmHg in % of humid gas', humidPercentOfMmHg(40), 5.26316],
  ['40 mmHg in % of dry gas', dryPercentOfMmHg(40), 5.6101],
  ['10 cmH2O in kPa', kpaOfCmH2o(10), 0.980665],
]

const readings: Check[] = [
  ['320 ppb at 4.2 % CO2, at 5 %', normalisedToCo2Ppb(320, 4.2), 380.952],
  [
    'dilution-corrected',
    dilutionCorrectedPpb(320, {
      roomAirPpb: 20,
      co2Percent: 4.2,
      inspiredCo2Percent: 0.04,
      alveolarCo2Percent: 5,
    }),
    377.692,
  ],
  ['20 ppb at 50 mL/s in pL/s', outputPlS(20, 50), 1000],
  ['18 and 20 ppb apart, %', percentOfMean(18, 20), 10.5263],
  ['18 and 19.5 ppb apart, %', percentOfMean(18, 19.5), 8],
  [
    'permeation of ammonia',
    permeationPpb({
      rateNgMin: 200,
      molarMassGPerMol: MOLAR_MASS.ammonia,
      flowLMin: 0.5,
      temperatureC: 25,
    }),
    574.609,
  ],
]

const sensor: Check[] = [
  // Euler–Bernoulli clamped beam; quartz constants and geometry are illustrative.
  ['fork of 4.0 mm', tuningForkFrequencyHz({ ...PRONG, lengthMm: 4 }), 33_018.5],
  ['fork of 3.8 mm', tuningForkFrequencyHz({ ...PRONG, lengthMm: 3.8 }), 36_585.6],
  ['fork of 4.01526 mm', tuningForkFrequencyHz({ ...PRONG, lengthMm: 4.01526 }), 32_768],
  ['bandwidth, Q 10⁴', resonanceBandwidthHz(32_768, 1e4), 3.2768],
  ['bandwidth, Q 10⁵', resonanceBandwidthHz(32_768, 1e5), 0.32768],
  ['ring-down in ms, Q 10⁴', 1000 * ringDownS(32_768, 1e4), 97.1405],
  ['ring-down in ms, Q 10⁵', 1000 * ringDownS(32_768, 1e5), 971.405],
  ['response detuned by 0.5 Hz', detunedResponse(0.5, 32_768, 1e4), 0.956453],
  ['detuning that loses 1 %', detuningForLossHz(1, 32_768, 1e4), 0.233459],
  ['noise-equivalent absorption', noiseEquivalentAbsorption(1e-6, 0.02, 0.25), 4e-8],
  ['relaxation of 10 µs', relaxationResponse(32_768, 1e-5), 0.436895],
  ['10–90 % rise of τ = 1 s (ln 9)', firstOrderRiseS(1), 2.19722],
]

test.each([...gases, ...humidity, ...readings, ...sensor])(
  '%s comes out to six figures',
  (_what, value, expected) => expectSixFigures(value, expected),
)

test('the pressure between 98.0 and 104.3 kPa changes the BTPS factor by at most 0.16 %', () => {
  // Johns 2004 (from memory).
  const standard = btpsFactor(20, SATURATED(20))
  for (const pressureKpa of [98, 104.3]) {
    const change = btpsFactor(20, SATURATED(20), pressureKpa) / standard - 1
    expect(Math.abs(change)).toBeLessThanOrEqual(0.0016)
    expect(Math.abs(change)).toBeGreaterThan(0.0005)
  }
})

test('30 to 45 mmHg are 3.95 to 5.92 % of humid and 4.21 to 6.31 % of dry gas', () => {
  expect(humidPercentOfMmHg(30)).toBeCloseTo(3.95, 2)
  expect(humidPercentOfMmHg(45)).toBeCloseTo(5.92, 2)
  expect(dryPercentOfMmHg(30)).toBeCloseTo(4.21, 2)
  expect(dryPercentOfMmHg(45)).toBeCloseTo(6.31, 2)
})

test('a mass concentration goes back to its mixing ratio', () => {
  const ugM3 = massConcentrationUgM3(123.4, MOLAR_MASS.acetone, 21, 99)
  expect(mixingRatioPpb(ugM3, MOLAR_MASS.acetone, 21, 99)).toBeCloseTo(123.4, 10)
})

test('a signal of 0.9 on a line of 0.1 + 0.002 per ppb stands for 400 ppb, corrected by 2 % for 408', () => {
  expect(calibratedPpb(0.9, { zero: 0.1, slopePerPpb: 0.002 })).toBeCloseTo(400, 10)
  expect(calibratedPpb(0.9, { zero: 0.1, slopePerPpb: 0.002, correction: 1.02 })).toBeCloseTo(
    408,
    10,
  )
})

test('the loss at a detuning and the detuning for a loss undo each other', () => {
  const detuningHz = detuningForLossHz(7, 32_768, 1.2e4)
  expect(detunedResponse(detuningHz, 32_768, 1.2e4)).toBeCloseTo(0.93, 12)
})
