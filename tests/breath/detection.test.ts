import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import type { Exhalation } from '#shared/breath/TraceResult.ts'
import { csvOf } from './support/csvOf.ts'
import { expectSixFigures } from './support/sixFigures.ts'

/** A CO2 trace of steps: each piece holds one value for so many seconds; gas follows CO2 · 100. */
type Piece = [co2: number, seconds: number, flow?: number]

const AIR = 0.04

function stepsCsv(pieces: Piece[], hz = 10): string {
  const rows: number[][] = []
  for (const [co2, seconds, flow = co2 > 1 ? 50 : 0] of pieces) {
    for (let k = 0; k < Math.round(seconds * hz); k++) {
      rows.push([rows.length / hz, co2, flow, co2 * 100])
    }
  }
  return csvOf(['time_s', 'co2_percent', 'flow_ml_s', 'acetone_ppb'], rows)
}

const breathsOf = async (...pieces: Piece[]) => (await readTrace(stepsCsv(pieces))).exhalations
const named = ({ flags }: Exhalation, name: string) => flags.filter((flag) => flag.name === name)

/** Where a step from `low` at `t` to `high` one sample later passes half of `maximum`. */
const crossing = (t: number, low: number, high: number, maximum: number) =>
  t + (0.1 * (maximum / 2 - low)) / (high - low)

describe('a cough', () => {
  test.each([
    [4, 'stays above half'],
    [2.6, 'stays above half'],
    [2, 'falls below half'],
    [1.6, 'falls below half'],
  ])('that dips to %s %% and %s leaves one exhalation', async (dip) => {
    const found = await breathsOf([AIR, 2], [5, 4], [dip, 0.4], [5, 5.6], [AIR, 3])
    expect(found).toHaveLength(1)
    expectSixFigures(found[0]!.startS, crossing(1.9, AIR, 5, 5))
    expectSixFigures(found[0]!.endS, crossing(11.9, 5, AIR, 5))
    expect(found[0]!.readings[0]!.meanPpb).toBe(500)
  })

  test.each([1.4, 1, 0.2])(
    'that dips to %s %%, below 30 %%, makes two exhalations',
    async (dip) => {
      const found = await breathsOf([AIR, 2], [5, 4], [dip, 0.4], [5, 5.6], [AIR, 3])
      expect(found).toHaveLength(2)
      expectSixFigures(found[0]!.endS, crossing(5.9, 5, dip, 5))
      expectSixFigures(found[1]!.startS, crossing(6.3, dip, 5, 5))
    },
  )

  test('that dips to exactly 30 % does not end it: it has to fall below', async () => {
    expect(await breathsOf([AIR, 2], [5, 4], [1.5, 0.4], [5, 5.6], [AIR, 3])).toHaveLength(1)
  })

  test('before the exhalation, half a second long, is not listed', async () => {
    const found = await breathsOf([AIR, 2], [3, 0.5], [AIR, 1], [5, 8], [AIR, 3])
    expect(found).toHaveLength(1)
    expectSixFigures(found[0]!.startS, crossing(3.4, AIR, 5, 5))
  })

  test('in the last three seconds lies in the window and lowers its mean', async () => {
    const found = await breathsOf([AIR, 2], [5, 7], [2, 0.5], [5, 2.5], [AIR, 3])
    // 25 samples of 500 ppb and 5 of 200 ppb.
    expectSixFigures(found[0]!.readings[0]!.meanPpb, 450)
    expect(found[0]!.window!.n).toBe(30)
  })
})

describe('the maximum', () => {
  test.each([0.5, 0.9, 0.99])('of %s %% is no breath', async (co2) => {
    expect(await breathsOf([AIR, 2], [co2, 8, 50], [AIR, 3])).toEqual([])
  })

  test.each([1, 1.01, 2])('of %s %% is one', async (co2) => {
    expect(await breathsOf([AIR, 2], [co2, 8, 50], [AIR, 3])).toHaveLength(1)
  })

  test('counts for each breath by itself: a small and a large one are both found', async () => {
    const found = await breathsOf([AIR, 2], [1.2, 6, 50], [AIR, 3], [6, 7], [AIR, 3])
    expect(found.map(({ endTidalCo2Percent }) => endTidalCo2Percent)).toEqual([1.2, 6])
  })

  test('of a large breath that follows a small one without air between leaves both', async () => {
    // 0.7 % is below 30 % of 5 %, though not of 2 %.
    const found = await breathsOf([AIR, 2], [2, 6], [0.7, 1], [5, 7], [AIR, 3])
    expect(found.map(({ endTidalCo2Percent }) => endTidalCo2Percent)).toEqual([2, 5])
    expectSixFigures(found[0]!.endS, crossing(7.9, 2, 0.7, 2))
    expectSixFigures(found[1]!.startS, crossing(8.9, 0.7, 5, 5))
  })

  test('of a slow fall is not mistaken for another breath', async () => {
    const fall: Piece[] = Array.from({ length: 60 }, (_, i) => [5 * Math.exp(-i / 15), 0.1, 0])
    expect(await breathsOf([AIR, 2], [5, 6], ...fall, [AIR, 3])).toHaveLength(1)
  })
})

test('a small breath after a slow fall is found with its own maximum', async () => {
  const fall: Piece[] = Array.from({ length: 60 }, (_, i) => [AIR + 5 * Math.exp(-i / 12), 0.1, 0])
  const found = await breathsOf([AIR, 2], [5, 6], ...fall, [AIR, 3], [1.2, 6, 50], [AIR, 3])
  expect(found.map(({ endTidalCo2Percent }) => endTidalCo2Percent)).toEqual([5.04, 1.2])
})

test('a breath of exactly one second is listed', async () => {
  // From nought to 5 % and back both crossings lie half a step from the samples.
  expect(await breathsOf([0, 2], [5, 1], [0, 3])).toHaveLength(1)
  expect(await breathsOf([0, 2], [5, 0.9], [0, 3])).toHaveLength(0)
})

describe('an early stop', () => {
  test.each([0.3, 0.5, 0.8])('after %s s is not listed', async (seconds) => {
    expect(await breathsOf([AIR, 2], [5, seconds], [AIR, 3])).toEqual([])
  })

  test.each([1.2, 2, 2.5, 2.9])('after %s s has no reading and is rejected', async (seconds) => {
    const [found] = await breathsOf([AIR, 2], [5, seconds], [AIR, 3])
    expect(found).toMatchObject({ window: null, accepted: false })
    expect(found!.readings[0]).toMatchObject({ meanPpb: null, n: 0, accepted: false })
    expect(named(found!, 'DUR')[0]).toMatchObject({ severity: 'reject', limit: 6 })
    expect(named(found!, 'PLATEAU_SHORT')[0]).toMatchObject({ severity: 'reject', limit: 3 })
  })

  test.each([3, 3.5, 4, 5, 5.9])('after %s s has a reading and is rejected', async (seconds) => {
    const [found] = await breathsOf([AIR, 2], [5, seconds], [AIR, 3])
    expect(found!.window!.n).toBe(30)
    expect(found!.readings[0]).toMatchObject({ meanPpb: 500, accepted: false })
    expectSixFigures(named(found!, 'DUR')[0]!.value, seconds)
    // 150 mL at 50 mL/s are the first three seconds.
    expect(found!.phaseThreeS).toBeCloseTo(seconds - 3, 9)
    expect(named(found!, 'PLATEAU_SHORT')).toHaveLength(seconds - 3 < 3 ? 1 : 0)
  })

  test.each([6, 6.5, 7.9])('after %s s is accepted with a warning for adults', async (seconds) => {
    const [found] = await breathsOf([AIR, 2], [5, seconds], [AIR, 3])
    expect(found!.accepted).toBe(true)
    expect(named(found!, 'DUR')[0]).toMatchObject({ severity: 'warn', limit: 8 })
  })

  test.each([
    [3.9, false],
    [4, true],
    [7, true],
  ])('of a child after %s s: accepted is %s, and never a warning', async (seconds, accepted) => {
    const text = stepsCsv([
      [AIR, 2],
      [5, seconds],
      [AIR, 3],
    ])
    const [found] = (await readTrace(text, { subject: 'child' })).exhalations
    expect(found!.accepted).toBe(accepted)
    expect(found!.flags.some(({ severity }) => severity === 'warn')).toBe(false)
    // 50 mL at 50 mL/s are the first second.
    expectSixFigures(found!.phaseThreeS, seconds - 1)
  })
})

describe('two exhalations', () => {
  test.each([0.5, 1, 2, 5, 10, 20, 29, 29.8])(
    '%s s apart are both found; the second came too soon',
    async (rest) => {
      const found = await breathsOf([AIR, 2], [5, 8], [AIR, rest], [4, 8], [AIR, 3])
      expect(found.map(({ number }) => number)).toEqual([1, 2])
      expect(named(found[0]!, 'REST')).toEqual([])
      const flag = named(found[1]!, 'REST')[0]
      expect(flag).toMatchObject({ severity: 'warn', limit: 30 })
      const end = crossing(9.9, 5, AIR, 5)
      expectSixFigures(flag!.value, crossing(9.9 + rest, AIR, 4, 4) - end)
      expect(found[1]!.accepted).toBe(true)
    },
  )

  test.each([30.1, 31, 60])('%s s apart are rested', async (rest) => {
    const found = await breathsOf([AIR, 2], [5, 8], [AIR, rest], [4, 8], [AIR, 3])
    expect(found).toHaveLength(2)
    expect(named(found[1]!, 'REST')).toEqual([])
  })
})

describe('a record that', () => {
  test('starts within an exhalation lists it as cut off', async () => {
    const found = await breathsOf([5, 7], [AIR, 3])
    expect(found[0]).toMatchObject({ startS: 0, cutOff: true, accepted: false })
    expect(named(found[0]!, 'RANGE')[0]).toMatchObject({ cause: 'cut-off', severity: 'reject' })
    expect(found[0]!.readings[0]).toMatchObject({ meanPpb: 500, accepted: false })
  })

  test('ends within an exhalation lists it as cut off', async () => {
    const found = await breathsOf([AIR, 3], [5, 7])
    expect(found[0]).toMatchObject({ endS: 9.9, cutOff: true, accepted: false })
    expect(named(found[0]!, 'RANGE')[0]).toMatchObject({ cause: 'cut-off', severity: 'reject' })
  })

  test('ends before CO2 fell below 30 % has not seen the end', async () => {
    const found = await breathsOf([AIR, 3], [5, 7], [1.6, 0.3])
    expect(found[0]).toMatchObject({ cutOff: true, accepted: false })
  })

  test('is one exhalation from end to end lists it', async () => {
    const found = await breathsOf([5, 9])
    expect(found).toHaveLength(1)
    expect(found[0]).toMatchObject({ startS: 0, endS: 8.9, cutOff: true })
  })

  test('holds no exhalation has no readings and no value', async () => {
    const { exhalations, analytes } = await readTrace(stepsCsv([[0.4, 9]]))
    expect(exhalations).toEqual([])
    expect(analytes[0]).toMatchObject({ nAccepted: 0, valuePpb: null, roomAirPpb: 40 })
  })
})

describe('flow', () => {
  test.each([
    [0.4, 0],
    [0.6, 1],
  ])('outwards for %s of the time decides whether it is a breath', async (share, count) => {
    const pieces: Piece[] = [
      [AIR, 2],
      [5, 8 * share, 50],
      [5, 8 * (1 - share), -50],
      [AIR, 3],
    ]
    expect(await breathsOf(...pieces)).toHaveLength(count)
  })

  test('runs from before CO2 rises and gives duration and volume', async () => {
    const [found] = await breathsOf([AIR, 2, 0], [AIR, 1, 40], [5, 6, 50], [AIR, 1, 20], [AIR, 3])
    expect(found!.durationS).toBe(8)
    expectSixFigures(found!.volumeMl, 40 + 300 + 20)
    expectSixFigures(found!.meanFlowMlS, 45)
    // The first 150 mL end 2.2 s after CO2 rose: 40 mL before it, 110 mL at 50 mL/s.
    expectSixFigures(found!.phaseThreeS, 6 - 2.2)
  })

  test.each([
    [7, 2.8],
    [2.8, 7],
  ])('that pauses after %s s, for %s s more, counts in its longer run', async (before, after) => {
    const pieces: Piece[] = [
      [5, before, 50],
      [5, 0.2, 0],
      [5, after, 50],
    ]
    const [found] = await breathsOf([AIR, 2], ...pieces, [AIR, 3])
    expect(found!.durationS).toBe(7)
    expectSixFigures(found!.volumeMl, 350)
  })

  test('that is not recorded leaves duration to CO2 and volume open', async () => {
    const rows = Array.from({ length: 140 }, (_, i) => [i / 10, i >= 20 && i < 120 ? 5 : AIR, 500])
    const text = csvOf(['time_s', 'co2_percent', 'acetone_ppb'], rows)
    const [found] = (await readTrace(text)).exhalations
    expect(found).toMatchObject({ volumeMl: null, meanFlowMlS: null, volumeBtpsMl: null })
    expectSixFigures(found!.durationS, crossing(11.9, 5, AIR, 5) - crossing(1.9, AIR, 5, 5))
    expectSixFigures(found!.phaseThreeS, 10)
    expect(found!.readings[0]!.normalisedSlopePerL).toBeNull()
  })
})
