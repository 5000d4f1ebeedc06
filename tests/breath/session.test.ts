import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import { sessionOfTraces } from '#shared/breath/session/sessionOfTraces.ts'
import type { TraceSettings } from '#shared/breath/settings/TraceSettings.ts'
import { expectSixFigures } from './support/sixFigures.ts'
import { air, breath, stepTrace } from './support/stepTrace.ts'

/** A session of exhalations of 10 s whose gas stands still at the given values; room air 20 ppb. */
const traceOf = (values: number[], gas = 'isoprene', comments = '') =>
  stepTrace([air(3), ...values.flatMap((value) => [breath(10, { gas: value }), air(31)])], {
    gas,
    comments,
  })

async function sessionOf(
  values: number[],
  settings: Partial<TraceSettings> = {},
  gas = 'isoprene',
  comments = '',
) {
  return (await readTrace(traceOf(values, gas, comments), settings)).analytes[0]!
}

describe('by the median', () => {
  test.each([
    [[310], null],
    [[310, 325], 317.5],
    [[310, 325, 318], 318],
    [[310, 325, 318, 900], 321.5],
    [[900, 310, 325, 318, 100], 318],
  ])('%o give %s', async (values, value) => {
    const session = await sessionOf(values)
    expect(session.valuePpb).toBe(value)
    expect(session.nAccepted).toBe(values.length)
    expect(session.gradientPpb).toBe(value === null ? null : value - 20)
  })

  test('three replicates give their spread to six figures', async () => {
    // 310, 325, 318: s 7.50555, CV 2.36271 % (by hand).
    const session = await sessionOf([310, 325, 318])
    expectSixFigures(session.sdPpb, 7.50555)
    expectSixFigures(session.cvPercent, 2.36271)
    expect(session.usedExhalations).toEqual([1, 2, 3])
  })

  test('exhalations that are rejected do not count', async () => {
    const pieces = [air(3), breath(10, { gas: 300 }), air(31), breath(5, { gas: 900 }), air(31)]
    const text = stepTrace([...pieces, breath(10, { gas: 310 }), air(3)])
    const { analytes, exhalations } = await readTrace(text)
    expect(exhalations.map(({ accepted }) => accepted)).toEqual([true, false, true])
    expect(analytes[0]).toMatchObject({ valuePpb: 305, nAccepted: 2, usedExhalations: [1, 3] })
  })

  test('the number needed is the protocol’s', async () => {
    expect((await sessionOf([310, 325], { fewestAccepted: 3 })).valuePpb).toBeNull()
    expect((await sessionOf([310], { fewestAccepted: 1 })).valuePpb).toBe(310)
  })
})

describe('by the first reproducible pair', () => {
  const pair = { sessionRule: 'pair' } as const
  test.each([
    // Within 10 % of the pair's mean: 300 and 331.5 differ by 9.98 %, 300 and 331.7 by 10.04 %.
    [[300, 331.5], [1, 2], 315.75],
    [[300, 331.7], null, null],
    [[300, 400, 310], [1, 3], 305],
    [[300, 400, 390], [2, 3], 395],
    // The third agrees with both earlier ones, which do not agree with each other: the earliest counts.
    [[300, 335, 318], [1, 3], 309],
    [[300], null, null],
  ])('%o give the pair %o and %s', async (values, used, value) => {
    const session = await sessionOf(values, pair)
    expect(session.firstPair).toEqual(used)
    expect(session.usedExhalations).toEqual(used ?? [])
    expect(session.valuePpb).toBe(value)
  })

  test.each([
    [[18, 20], true],
    [[18, 20.1], false],
    [[29, 31], true],
    [[29, 31.5], false],
    [[30, 33], true],
    [[30, 33.2], false],
    [[5, 6.9], true],
  ])('nitric oxide %o agree: %s', async (values, agrees) => {
    const session = await sessionOf(values, pair, 'nitric_oxide')
    expect(session.firstPair !== null).toBe(agrees)
  })

  test('the same values of another gas agree by per cent alone', async () => {
    // 18 and 20 ppb differ by 10.5263 %, 18 and 19.5 by 8 %.
    expect((await sessionOf([18, 20], pair)).firstPair).toBeNull()
    expect((await sessionOf([18, 19.5], pair)).firstPair).toEqual([1, 2])
  })

  test('two readings below the limit of detection agree, one does not', async () => {
    const comments = '# isoprene_lod_ppb: 30\n'
    const both = await sessionOf([22, 29], pair, 'isoprene', comments)
    expect(both).toMatchObject({ firstPair: [1, 2], valuePpb: 25.5, censored: true })
    const one = await sessionOf([22, 31], pair, 'isoprene', comments)
    expect(one).toMatchObject({ firstPair: null, valuePpb: null })
  })
})

describe('normalised values', () => {
  const both = (gas: string) => ({ normalise: [gas], correctDilution: [gas] })

  test('are those of the readings, by the same rule', async () => {
    const session = await sessionOf([310, 325, 318], both('isoprene'))
    // CO2 stands at 5 %: normalised to 5 % nothing changes, and F_A = F leaves the dilution at nought.
    expectSixFigures(session.co2Normalised.ppb, 318)
    expectSixFigures(session.dilutionCorrected.ppb, 318)
    const other = await sessionOf([310, 325, 318], {
      ...both('isoprene'),
      referenceCo2Percent: 4,
      alveolarCo2Percent: 5.6,
    })
    expectSixFigures(other.co2Normalised.ppb, 254.4)
    expectSixFigures(other.dilutionCorrected.ppb, 20 + (298 * 5.56) / 4.96)
  })

  test.each(['nitric_oxide', 'ammonia', 'acetone'])(
    'of %s are refused though asked for',
    async (gas) => {
      const session = await sessionOf([310, 325], both(gas), gas)
      const refused = { ppb: null, why: 'never-for-this-gas' }
      expect(session).toMatchObject({
        valuePpb: 317.5,
        co2Normalised: refused,
        dilutionCorrected: refused,
      })
    },
  )

  test('are not there unless asked for', async () => {
    const { co2Normalised } = await sessionOf([310, 325])
    expect(co2Normalised).toEqual({ ppb: null, why: 'not-asked' })
  })
})

describe('uncertainty', () => {
  const known = { calibrationExpandedPercent: 5, resolutionPpb: 1, driftPercent: 1 }

  test('of the median of three stands on its value and their scatter', async () => {
    const session = await sessionOf([310, 325, 318], { analytes: { isoprene: known } })
    // s/√3, 318 · 2.5 %, 1/√12, 318 · 1 %/√3 (by hand, GUM).
    const combined = Math.hypot(4.33333333, 7.95, 0.288675135, 1.83597386)
    expectSixFigures(session.uncertainty?.combinedPpb, combined)
    expectSixFigures(session.uncertainty?.expandedPpb, 2 * combined)
    expect(session.gradientUncertainty).toBeNull()
  })

  test('of the gradient takes room air in', async () => {
    const analytes = { isoprene: { ...known, roomAirPpb: 20, roomAirStandardUncertaintyPpb: 2 } }
    const session = await sessionOf([310, 325, 318], { analytes, coverage: 3 })
    const own = session.uncertainty!.combinedPpb
    expectSixFigures(session.gradientUncertainty?.combinedPpb, Math.hypot(own, 2))
    expectSixFigures(session.gradientUncertainty?.expandedPpb, 3 * Math.hypot(own, 2))
  })

  test('is not stated where the calibration’s is unknown', async () => {
    expect((await sessionOf([310, 325])).uncertainty).toBeNull()
  })
})

test('several traces make one session, numbered on, each with its own room air', async () => {
  const first = await readTrace(traceOf([310, 325]))
  const other = stepTrace([air(3, { gas: 40 }), breath(10, { gas: 318 }), air(3, { gas: 40 })])
  const second = await readTrace(other)
  const { exhalations, analytes } = sessionOfTraces([first, second])
  expect(exhalations.map(({ number }) => number)).toEqual([1, 2, 3])
  expect(analytes).toHaveLength(1)
  // Gradients 290, 305 and 278; room air 20 and 40.
  expect(analytes[0]).toMatchObject({
    valuePpb: 318,
    nAccepted: 3,
    gradientPpb: 290,
    roomAirPpb: 30,
  })
})

test('two gases in one file are judged each by itself', async () => {
  const text = stepTrace([
    air(3),
    breath(10, { gas: 300 }),
    air(31),
    breath(10, { gas: 310 }),
    air(3),
  ])
  const lines = text.trimEnd().split('\n')
  const two = lines.map((line, i) => (i === 0 ? `${line},nitric_oxide_ppm` : `${line},${i / 1e4}`))
  const { analytes, exhalations } = await readTrace(two.join('\n'))
  expect(analytes.map(({ analyte }) => analyte)).toEqual(['isoprene', 'nitric_oxide'])
  expect(analytes[0]!.valuePpb).toBe(305)
  // Samples 100 to 129 of the file, in ppm i + 1 ten-thousandths: their middle is 11.55 ppb.
  expectSixFigures(exhalations[0]!.readings[1]!.meanPpb, 11.55)
})

test('the columns given to an analysis stay as they were', async () => {
  const { readColumns } = await import('#shared/breath/file/readColumns.ts')
  const { analyseTrace } = await import('#shared/breath/analyseTrace.ts')
  const columns = await readColumns(traceOf([310, 325]))
  const before = structuredClone(columns)
  const settings = { analytes: { isoprene: { transportDelayS: 0.15, inverseFilterS: 1 } } }
  const once = analyseTrace(columns, settings)
  expect(columns).toEqual(before)
  expect(analyseTrace(columns, settings)).toEqual(once)
})
