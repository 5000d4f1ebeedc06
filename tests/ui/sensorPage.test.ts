import { readFileSync } from 'node:fs'
import Papa from 'papaparse'
import { describe, expect, test } from 'vitest'
import type { CalibrationWeights } from '#shared/statistics/sensor/calibrationLine.ts'
import { allanOf, atInterval } from '../../src/features/sensors/allanOf.ts'
import { blankLimitsOf, readBlanks } from '../../src/features/sensors/blanksOf.ts'
import {
  calibrate,
  levelOfSignal,
  limitsOf,
  readStandards,
} from '../../src/features/sensors/calibrationOf.ts'
import { suggestedColumn, unitOf } from '../../src/features/sensors/columnHints.ts'
import { CONVERSIONS } from '../../src/features/sensors/conversions.ts'
import { numbersIn, readCsv } from '../../src/features/sensors/csvTable.ts'
import { seriesReader } from '../../src/features/sensors/seriesReader.ts'
import {
  BUDGET_ENTRIES,
  readExhalations,
  uncertaintyOf,
} from '../../src/features/sensors/uncertaintyOf.ts'
import { readEntries } from '../../src/forms/entries.ts'

const folder = new URL('../statistics/references/', import.meta.url)
const textOf = (name: string) => readFileSync(new URL(`data/${name}.csv`, folder), 'utf8')
type Value = Record<string, number & Record<string, number>>
/** Values of numpy 1.24.2 and scipy 1.10.1: tests/statistics/references/SOURCES.md. */
const valuesOf = (file: string, quantity: string): Value[] => {
  const { records } = JSON.parse(readFileSync(new URL(`results/${file}.json`, folder), 'utf8'))
  const found = records.filter((record: { quantity: string }) => record.quantity === quantity)
  expect(found.length).toBeGreaterThan(0)
  return found.map(({ value }: { value: Value }) => value)
}

const close = (value: number | null | undefined, wanted: number) =>
  expect(Math.abs(value! - wanted)).toBeLessThanOrEqual(1e-9 * Math.abs(wanted))

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

describe('the sample of a noise series', () => {
  const seriesOf = (text: string, column = 'signal_ppb', pieces = 1) => {
    const data = Papa.parse<string[]>(text, { skipEmptyLines: false }).data
    const reader = seriesReader(column)
    const size = Math.ceil(data.length / pieces)
    for (let at = 0; at < data.length; at += size) reader.take(data.slice(at, at + size))
    return reader.series()
  }

  test('gives the Allan deviations and the minimum, however it is cut into pieces', () => {
    const [overlapping] = valuesOf('allan-1', 'overlapping_allan_deviation')
    const [apart] = valuesOf('allan-1', 'allan_deviation_not_overlapping')
    const outcome = allanOf(seriesOf(textOf('noise-series-1'), 'signal_ppb', 7))
    if (outcome.problem !== null) throw new Error(outcome.problem)
    for (const [points, value] of [
      [outcome.overlapping, overlapping],
      [outcome.apart, apart],
    ] as const) {
      const wanted = value as unknown as { deviation: number[]; terms: number[]; m: number[] }
      expect(points.map(({ m }) => m)).toEqual(wanted.m)
      expect(points.map(({ terms }) => terms)).toEqual(wanted.terms)
      for (const [at, point] of points.entries()) close(point.deviation, wanted.deviation[at]!)
    }
    expect(atInterval(outcome.overlapping, 0.5).map(({ tauS }) => tauS)).toEqual(
      outcome.overlapping.map(({ m }) => m / 2),
    )
  })

  test('with a line that is no number is not computed, and the line is named', () => {
    const lines = textOf('noise-series-1').split('\n')
    lines[41] = 'n/a'
    const outcome = allanOf(seriesOf(lines.join('\n'), 'signal_ppb', 3))
    expect(outcome.problem).toMatch(/not evenly spaced/)
    expect(outcome).toMatchObject({
      refusedCount: 1,
      refused: [{ line: 42, column: 'signal_ppb' }],
    })
  })

  test('names a hundred refused lines at most, and counts all', () => {
    const { refused, refusedCount } = seriesOf(`signal_ppb\n${'x\n'.repeat(5000)}`)
    expect(refused).toHaveLength(100)
    expect(refusedCount).toBe(5000)
  })

  test('that is too short says so', () => {
    expect(allanOf(seriesOf('signal_ppb\n1\n2\n')).problem).toMatch(/at least 3 readings/)
  })
})

describe('a text of columns', () => {
  test.each([
    ['', /nothing to read/],
    ['# a remark\n\n', /nothing to read/],
    ['level,signal\n', /only a line of headings/],
    ['1,2\n3,4\n', /Line 1 holds numbers/],
    ['level,,signal\n1,2,3\n', /column 2 has no heading/],
    ['\nlevel,level\n1,2\n', /Line 2: two columns are called "level"/],
  ])('%j is refused in words', (text, sentence) => {
    expect(readCsv(text)).toEqual({ problem: expect.stringMatching(sentence) })
  })

  test('is read with commas, semicolons or tabs, and passes over remarks and blank lines', () => {
    for (const sign of [',', ';', '\t']) {
      const read = readCsv(`# made up\nlevel${sign}signal\n\n1${sign}2.5\n`)
      expect(read).toEqual({
        table: { headings: ['level', 'signal'], rows: [{ line: 4, cells: ['1', '2.5'] }] },
      })
    }
  })

  test('names every cell that it cannot read by line and column, and takes the other rows', () => {
    const read = readCsv('level_ppb,signal_nA\n50,1.4\n,1.5\n100,"2,1"\n200\n200,3.3\n')
    if ('problem' in read) throw new Error(read.problem)
    const { rows, refused } = numbersIn(read.table, ['level_ppb', 'signal_nA'])
    expect(rows).toEqual([
      [50, 1.4],
      [200, 3.3],
    ])
    expect(refused.map(({ line, column }) => `${line} ${column}`)).toEqual([
      '3 level_ppb',
      '4 signal_nA',
      '5 signal_nA',
    ])
    expect(refused[0]!.why).toBe('blank')
    expect(refused[1]!.why).toMatch(/without a comma/)
    expect(refused[2]!.why).toMatch(/ends before/)
  })

  test('counts lines as an editor does where a quoted cell runs over two', () => {
    const read = readCsv('note,level\n"two\nlines",1\nx,y\n')
    if ('problem' in read) throw new Error(read.problem)
    expect(read.table.rows.map(({ line }) => line)).toEqual([2, 4])
  })

  test('suggests columns by their headings and takes units that stand in them alone', () => {
    expect(suggestedColumn(['run', 'certified_ppm', 'response'], /certified/i, 0)).toBe(
      'certified_ppm',
    )
    expect(suggestedColumn(['a', 'b'], /level/i, -1)).toBe('b')
    expect(unitOf('level (µg/m³)')).toBe('µg/m³')
    expect(unitOf('my_level')).toBeUndefined()
    expect(unitOf('ppb')).toBeUndefined()
  })
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

describe('the uncertainty of a session', () => {
  const budget = (typed: Record<string, string> = {}) => readEntries(BUDGET_ENTRIES, typed).values!

  test('adds repeatability, calibration, step and drift (JCGM 100:2008)', () => {
    const { values } = readExhalations('310 325; 318')
    const found = uncertaintyOf(values!, budget()).found!
    expect(found.value).toBeCloseTo(317.667, 3)
    expect(found.repeatability).toBeCloseTo(4.33333, 5)
    expect(found.calibration).toBeCloseTo(7.94167, 5)
    expect(found.resolution).toBeCloseTo(0.288675, 6)
    expect(found.drift).toBeCloseTo(1.83405, 5)
    expect(found.combined).toBeCloseTo(9.23552, 5)
    expect(found.degreesOfFreedom).toBeCloseTo(41.2656, 4)
    expect(found.expanded).toBeCloseTo(18.471, 4)
  })

  test('takes room air off the value and adds its uncertainty', () => {
    const { values } = readExhalations('310, 325, 318\n')
    const found = uncertaintyOf(values!, budget({ ambientMean: '20', ambientUncertainty: '2' }))
      .found!
    expect(found.value).toBeCloseTo(297.667, 3)
    expect(found.combined).toBeCloseTo(9.4496, 4)
  })

  test('needs two values, and numbers', () => {
    expect(uncertaintyOf([310], budget()).problem).toMatch(/at least two exhalations/)
    expect(readExhalations(' \n').problem).toMatch(/Give the values/)
    expect(readExhalations('310 abc').problem).toMatch(/"abc" is not a number/)
    expect(readEntries(BUDGET_ENTRIES, { coverage: '0' }).problems).toHaveProperty('coverage')
  })
})

describe('conversions', () => {
  const all = CONVERSIONS.flatMap(({ conversions }) => conversions)
  const resultsOf = (key: string, typed: Record<string, string> = {}) => {
    const { results, problems } = all.find((each) => each.key === key)!.convert(typed)
    expect(problems).toBeNull()
    return results!.map(({ value }) => value)
  }

  /** Check values of the equations to six digits, worked out apart from the code. */
  test.each([
    ['mass', {}, ['696.126 µg/m³', '1,436.52 ppb']],
    ['mass', { temperature: '0' }, ['759.839 µg/m³']],
    ['dry', {}, ['532.955 ppb', '6.26531 kPa']],
    ['volume', {}, ['545.463 mL']],
    ['pressure', {}, ['5.33289 kPa', '5.26316 %', '5.6101 %']],
    ['pressure', { value: '10' }, ['1.33322 kPa', '1.31579 %', '1.40252 %', '0.980665 kPa']],
    ['co2', {}, ['380.952 ppb', '377.692 ppb']],
    ['output', {}, ['1,000 pL/s']],
    ['permeation', {}, ['574.609 ppb']],
    ['resonator', {}, ['3.2768 Hz', '97.1405 ms', '95.6453 %', '0.233459 Hz']],
    ['fork', {}, ['33,018.5 Hz']],
    ['relaxation', {}, ['43.6895 %']],
    ['response', {}, ['2.19722 s']],
    ['absorption', {}, ['4.00000 × 10^−8 W·cm⁻¹·Hz^−½']],
  ])('%s with %o', (key, typed, wanted) => {
    expect(resultsOf(key, typed).slice(0, wanted.length)).toEqual(wanted)
  })

  test('refuse numbers that do not go together at the box to change', () => {
    const problemsOf = (key: string, typed: Record<string, string>) =>
      all.find((each) => each.key === key)!.convert(typed).problems
    expect(problemsOf('co2', { co2: '0.03' })).toEqual({ co2: 'Above the CO2 breathed in.' })
    expect(problemsOf('dry', { pressure: '6' })).toHaveProperty('pressure')
    expect(problemsOf('mass', { temperature: '-300' })).toHaveProperty('temperature')
    expect(problemsOf('response', { time: '0' })).toEqual({ time: 'Above 0.' })
  })
})
