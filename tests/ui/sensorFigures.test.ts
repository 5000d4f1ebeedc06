import { describe, expect, test } from 'vitest'
import { CONVERSIONS } from '../../src/features/sensors/conversions.ts'
import {
  BUDGET_ENTRIES,
  readExhalations,
  uncertaintyOf,
} from '../../src/features/sensors/uncertaintyOf.ts'
import { readEntries } from '../../src/forms/entries.ts'

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
