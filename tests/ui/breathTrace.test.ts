import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import type { Flag } from '#shared/breath/TraceResult.ts'
import { inventedTrace } from '../../src/features/sensors/inventedTrace.ts'
import { type TraceChoices, traceOf } from '../../src/features/sensors/traceOf.ts'
import { sessionFacts, sessionSentence } from '../../src/features/sensors/traceSession.ts'
import { flagWords, verdictOf } from '../../src/features/sensors/verdictWords.ts'
import { csvOf } from '../breath/support/csvOf.ts'
import { expectSixFigures } from '../breath/support/sixFigures.ts'

const choices: TraceChoices = {
  subject: 'adult',
  targetFlowMlS: 50,
  sessionRule: 'median',
  normalise: false,
  correctDilution: false,
}
const foundIn = async (text: string, more: Partial<TraceChoices> = {}) => {
  const outcome = await traceOf(text, { ...choices, ...more })
  if (outcome.refusal) throw new Error(outcome.refusal.reason)
  return outcome
}
const wordsOf = (reasons: { name: string; words: string }[]) =>
  reasons.map(({ name, words }) => `${name} ${words}`)

describe('the invented trace', () => {
  /** The figures of the worked example in docs/methods/breath.md, worked out by hand from its formulas. */
  test('begins with the worked example, to six figures', async () => {
    const { result } = await foundIn(inventedTrace(), { normalise: true, correctDilution: true })
    const [first] = result.exhalations
    expectSixFigures(first!.endTidalCo2Percent, 5.236)
    expectSixFigures(first!.startS, 2.38313)
    expectSixFigures(first!.readings[0]!.meanPpb, 497.983)
    expectSixFigures(first!.readings[0]!.gradientPpb, 477.983)
    expectSixFigures(first!.readings[0]!.co2Normalised.ppb, 480.864)
    expectSixFigures(first!.readings[0]!.dilutionCorrected.ppb, 481.424)
  })

  test('has two exhalations to keep and one that is too short, each in words', async () => {
    const { result } = await foundIn(inventedTrace())
    const verdicts = result.exhalations.map((each) => verdictOf(each, 'isoprene'))
    expect(verdicts.map(({ title }) => title)).toEqual(['Accepted', 'Accepted', 'Left out'])
    expect(wordsOf(verdicts[0]!.reasons)).toEqual([
      'DUR Blown for 10 s.',
      'PLATEAU_SHORT Plateau 7 s long.',
      'CO2_LOW End-tidal CO2 5.24 %.',
      'FLOW Mean flow 50 mL/s.',
    ])
    expect(wordsOf(verdicts[2]!.reasons).slice(0, 2)).toEqual([
      'DUR Blown for 5 s; at least 6 s needed.',
      'PLATEAU_SHORT Plateau 2 s long; at least 3 s needed.',
    ])
  })

  test('gives each exhalation its curve with a second on either side', async () => {
    const { result, curves } = await foundIn(inventedTrace())
    expect(curves).toHaveLength(3)
    for (const [at, { timeS, co2Percent, gases }] of curves.entries()) {
      const { startS, endS } = result.exhalations[at]!
      expect(timeS[0]).toBeCloseTo(startS - 1, 0)
      expect(timeS.at(-1)).toBeCloseTo(endS + 1, 0)
      expect([co2Percent.length, gases[0]!.length]).toEqual([timeS.length, timeS.length])
    }
  })

  test('has a session value with what it stands on', async () => {
    const { result } = await foundIn(inventedTrace(), { calibrationExpandedPercent: 5 })
    const session = result.analytes[0]!
    expect(sessionSentence(session)).toBe(
      'Median of two, which is their mean: exhalations 1 and 2; 2 accepted.',
    )
    const facts = Object.fromEntries(sessionFacts(session).map(({ term, value }) => [term, value]))
    // The closed form in both: 20 + 480·f and 20 + 465·f with f = 477.983/480, mean 490.515, SD 10.562;
    // U = 2·√(10.562²/2 + (0.05·490.515/2)²) = 28.7 by JCGM 100:2008.
    expect(facts).toMatchObject({
      'SD of the accepted': '10.56 ppb',
      'CV of the accepted': '2.15 %',
      'First two that agree': '1 and 2',
      'Expanded uncertainty': '± 28.7 ppb (k = 2)',
      'Room air': '20 ppb',
      'Value less room air': '470.5 ppb',
    })
    expect(facts).not.toHaveProperty('At 5 % CO2')
  })
})

describe('a gas that is never normalised', () => {
  test('says so where somebody asked', async () => {
    const text = inventedTrace().replace('isoprene_ppb', 'acetone_ppb')
    const { result } = await foundIn(text, { normalise: true, correctDilution: true })
    expect(sessionFacts(result.analytes[0]!).slice(-2)).toEqual([
      { term: 'At 5 % CO2', value: expect.stringMatching(/^never for this gas/) },
      { term: 'Corrected for dilution', value: expect.stringMatching(/^never for this gas/) },
    ])
  })
})

describe('what is still needed', () => {
  const plateaus = (...levels: number[]) =>
    csvOf(
      ['time_s', 'co2_percent', 'nitric_oxide_ppb'],
      Array.from({ length: 450 * levels.length }, (_, i) => {
        const out = i % 450 >= 50 && i % 450 < 150
        return [i / 10, out ? 5 : 0.04, out ? levels[Math.floor(i / 450)]! : 1]
      }),
    )

  test('is counted in exhalations', async () => {
    const { analytes } = await readTrace(plateaus(20))
    expect(sessionSentence(analytes[0]!)).toBe(
      'No value yet: 2 accepted exhalations are needed; 1 accepted so far.',
    )
  })

  test('is said with the limits of agreement where two must agree', async () => {
    const { analytes } = await readTrace(plateaus(20, 40), { sessionRule: 'pair' })
    expect(sessionSentence(analytes[0]!)).toBe(
      'No value yet: two that agree within 10 % (below 30 ppb: within 2 ppb) are needed; 2 accepted so far, and no two of them agree.',
    )
    expect(sessionFacts(analytes[0]!)).toContainEqual({
      term: 'First two that agree',
      value: 'none yet',
    })
  })
})

test('a file that cannot be read is a refusal with line, column and reason', async () => {
  const lines = inventedTrace().split('\n')
  lines[4] = '0.2,"0,04",0,20'
  expect(await traceOf(lines.join('\n'), choices)).toEqual({
    refusal: { line: 5, column: 2, reason: expect.stringMatching(/quot/i) },
  })
})

describe('a flag in words', () => {
  const flag = (more: Partial<Flag>): Flag => ({
    name: 'DUR',
    cause: 'too-short',
    severity: 'reject',
    analyte: null,
    value: 5.1,
    limit: 6,
    unit: 's',
    ...more,
  })

  test('names the value, the limit and the unit', () => {
    expect(flagWords(flag({}))).toBe('Blown for 5.1 s; at least 6 s needed.')
    expect(
      flagWords(
        flag({ name: 'REBREATHE', cause: 'inspired-co2', value: 0.61, limit: 0.5, unit: '%' }),
      ),
    ).toBe('CO2 breathed in 0.61 %, above 0.5 %.')
  })

  test('has as many digits as tell the value from its limit', () => {
    expect(flagWords(flag({ value: 5.99996 }))).toBe('Blown for 5.99996 s; at least 6 s needed.')
  })

  test('says what is wrong where there is no number', () => {
    expect(flagWords(flag({ name: 'RANGE', cause: 'cut-off', value: null, limit: null }))).toBe(
      'The record begins or ends in the middle of it.',
    )
  })

  test('does not call a plateau too short that is long enough but has a hole', () => {
    const hole = flag({ name: 'PLATEAU_SHORT', cause: 'phase-three-short', value: 4, limit: 3 })
    expect(flagWords(hole)).toBe('The last 3 s are not all recorded.')
  })

  test('of another gas says nothing of this one', async () => {
    const { result } = await foundIn(inventedTrace())
    const exhalation = {
      ...result.exhalations[0]!,
      flags: [flag({ name: 'RANGE', cause: 'saturated', analyte: 'acetone', unit: 'ppb' })],
    }
    expect(verdictOf(exhalation, 'isoprene').title).toBe('Accepted')
  })

  test('that only warns keeps the reading and stands in the title', async () => {
    const { result } = await foundIn(inventedTrace())
    const warning = flag({
      name: 'REST',
      cause: 'rest-short',
      severity: 'warn',
      value: 12,
      limit: 30,
    })
    const verdict = verdictOf({ ...result.exhalations[0]!, flags: [warning] }, 'isoprene')
    expect(verdict.title).toBe('Accepted, with a warning')
    expect(verdict.reasons[0]!.words).toBe('Rested for 12 s before it; 30 s or longer is better.')
  })
})

test('readings that do not differ have a spread of nought, not of rounding', async () => {
  const { result } = await foundIn(inventedTrace())
  const session = { ...result.analytes[0]!, sdPpb: 3.6e-13, cvPercent: 5e-14 }
  expect(sessionFacts(session)).toContainEqual({ term: 'SD of the accepted', value: '0 ppb' })
})
