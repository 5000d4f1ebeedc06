import { describe, expect, test } from 'vitest'
import type { CalibrationWeights } from '#shared/statistics/sensor/calibrationLine.ts'
import { blankLimitsOf, readBlanks } from '../../src/features/sensors/blanksOf.ts'
import {
  calibrate,
  levelOfSignal,
  limitsOf,
  readStandards,
} from '../../src/features/sensors/calibrationOf.ts'
import { unitOf } from '../../src/features/sensors/columnHints.ts'
import { close, textOf, type Value, valuesOf } from '../support/sensorSamples.ts'

const asSuggested = { levelColumn: null, signalColumn: null }
const standards = readStandards({
  text: textOf('gas-standards-1'),
  weights: 'none',
  ...asSuggested,
}).standards!
const blanksGiven = { kindColumn: null, signalColumn: null, blankKind: null, lowKind: null }
const blanks = readBlanks({ text: textOf('gas-blanks-1'), ...blanksGiven }).blanks!

describe('the sample of gas standards', () => {
  test('is read by its headings, with the units that stand in them', () => {
    expect(standards.levelColumn).toBe('level_ppb')
    expect(standards.signalColumn).toBe('signal_nA')
    expect(unitOf(standards.levelColumn)).toBe('ppb')
    expect(unitOf(standards.signalColumn)).toBe('nA')
    expect(standards.levels).toHaveLength(21)
    expect(standards.refused).toEqual([])
  })

  test.each([
    ['none', 'unweighted'],
    ['1/x', 'weighted_1_over_x'],
    ['1/x²', 'weighted_1_over_x2'],
  ] as [CalibrationWeights, string][])(
    'gives line, lack of fit and back-calculated levels with weights %s',
    (weights, name) => {
      const [value] = valuesOf('calibration-1', `calibration_${name}`)
      const { line, back } = calibrate(standards, weights).calibration!
      close(line.intercept, value!.intercept!)
      close(line.slope, value!.slope!)
      close(line.interceptStandardError, value!.intercept_se!)
      close(line.slopeInterval.lower, value!.slope_ci95!.lower!)
      close(line.residualSd, value!.residual_sd!)
      close(line.rSquared, value!.r_squared!)
      close(line.lackOfFit?.f, value!.lack_of_fit!.f!)
      close(line.lackOfFit?.p, value!.lack_of_fit!.p!)
      const levels = valuesOf('calibration-1', `back_calculated_${name}`)[0] as unknown as Value[]
      expect(back).toHaveLength(levels.length)
      for (const [at, wanted] of levels.entries()) {
        close(back[at]!.mean, wanted.mean_back_calculated!)
        close(back[at]!.relativeErrorPercent, wanted.mean_relative_error_percent!)
      }
    },
  )

  test('gives the level of a signal with Fieller limits, and none on a weighted line', () => {
    for (const value of valuesOf('calibration-1', 'inverse_prediction')) {
      const { calibration } = calibrate(standards, 'none')
      const { found, note } = levelOfSignal(calibration!, value.mean_signal!, value.readings!)
      close(found.level, value.level!)
      close(found.standardError, value.se!)
      close(found.fieller?.lower, value.fieller_ci95!.lower!)
      close(found.fieller?.upper, value.fieller_ci95!.upper!)
      expect(note).toBeNull()
    }
    const weighted = calibrate(standards, '1/x').calibration!
    expect(levelOfSignal(weighted, 4.6, 3).note).toMatch(/unweighted/)
  })

  test.each([
    ['none', 'unweighted'],
    ['1/x', 'weighted_1_over_x'],
  ] as [CalibrationWeights, string][])(
    'gives limits of detection and quantitation with weights %s',
    (weights, name) => {
      const [value] = valuesOf('calibration-1', `lod_loq_${name}`)
      const blankSd = blankLimitsOf(blanks).limits!.blank.sd
      const limits = limitsOf(calibrate(standards, weights).calibration!, blankSd)
      close(limits.fromBlanks?.detection, value!.sd_of_blanks!.lod!)
      close(limits.fromBlanks?.quantitation, value!.sd_of_blanks!.loq!)
      close(limits.fromInterceptError.detection, value!.se_of_intercept!.lod!)
      // On a weighted line the residual SD is in units of signal·√weight, so the page shows none.
      if (weights === 'none') close(limits.fromResidualSd?.detection, value!.residual_sd!.lod!)
      else expect(limits.fromResidualSd).toBeNull()
    },
  )
})

test('the sample of blanks gives limit of blank and of detection (EP17-A2)', () => {
  const [value] = valuesOf('calibration-1', 'lob_lod_classical')
  expect(blanks.kinds).toEqual(['blank', 'low'])
  const limits = blankLimitsOf(blanks).limits!
  expect(limits.blank.n).toBe(value!.n_blank)
  close(limits.blank.sd, value!.sd_blank!)
  close(limits.limitOfBlank, value!.lob_signal!)
  close(limits.limitOfDetection, value!.lod_signal!)
  close(limits.limitOfDetectionSmallSample, value!.lod_signal_small_sample!)
})

describe('a calibration that cannot be drawn says what to do', () => {
  const problemOf = (text: string, weights: CalibrationWeights = 'none') =>
    calibrate(readStandards({ text, weights, ...asSuggested }).standards!, weights).problem

  test.each([
    ['level,signal\n1,2\n2,3\n', 'none', /at least 3 points.*more standards/],
    ['level,signal\n1,2\n1,3\n1,4\n', 'none', /at least two levels/],
    ['level,signal\n1,2\n2,2\n3,2\n', 'none', /a signal that follows/],
    ['level,signal\n0,2\n1,3\n2,4\n', '1/x', /unweighted line or leave out the zero standard/],
    ['level\n1\n2\n3\n', 'none', /same column/],
  ] as [string, CalibrationWeights, RegExp][])('%j with weights %s', (text, weights, sentence) => {
    expect(problemOf(text, weights)).toMatch(sentence)
  })

  test('a zero standard has no residual in percent', () => {
    const read = readStandards({
      text: 'level,signal\n0,2\n1,3\n2,4.1\n',
      weights: 'none',
      ...asSuggested,
    })
    const { readings } = calibrate(read.standards!, 'none').calibration!
    expect(readings.map(({ percent }) => percent === null)).toEqual([true, false, false])
  })
})

test('blanks and low samples that are too few, or the same, are refused in words', () => {
  const text = 'kind,signal\nblank,0.8\nlow,1.1\nlow,1.2\n'
  expect(blankLimitsOf(readBlanks({ text, ...blanksGiven }).blanks!).problem).toMatch(/two blank/)
  const same = readBlanks({ text, ...blanksGiven, blankKind: 'low', lowKind: 'low' }).blanks!
  expect(blankLimitsOf(same).problem).toMatch(/same word/)
})
