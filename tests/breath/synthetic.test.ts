import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import { exponentialWindow } from './support/exponentialWindow.ts'
import { seededNoise } from './support/seededNoise.ts'
import { expectSixFigures } from './support/sixFigures.ts'
import {
  aBreath,
  type Breath,
  crossingsOf,
  csvOfBreath,
  rowsOf,
} from './support/syntheticBreath.ts'

// Every expected figure comes from sums of geometric series or from the formula at one instant; the
// window's samples are known by counting: it is the last three seconds of the exhalation.

const WINDOW_S = 3

/** The plateau of a breath by formula: mean and slope of its last three seconds. */
function plateauOf(breath: Breath) {
  const { roomAir, rise, tauS, drift, durationS, hz } = breath
  return exponentialWindow(
    { level: roomAir + rise, size: -rise, tau: tauS, drift },
    { first: durationS - WINDOW_S, step: 1 / hz, n: WINDOW_S * hz },
  )
}

const clean: Breath[] = [10, 20, 25, 50, 100].flatMap((hz) =>
  [6, 8, 10].flatMap((durationS) =>
    [0.8, 1.5].map((tauS) => ({ ...aBreath, hz, durationS, tauS, rise: 100 + hz })),
  ),
)

describe('a clean exhalation', () => {
  test.each(clean)('at $hz Hz of $durationS s with τ $tauS s gives its figures', async (breath) => {
    const { exhalations, analytes } = await readTrace(csvOfBreath(breath))
    expect(exhalations).toHaveLength(1)
    const [exhalation] = exhalations
    const { startS, endS, maximum } = crossingsOf(breath)
    const { mean, slope } = plateauOf(breath)
    const reading = exhalation!.readings[0]!
    expectSixFigures(exhalation!.startS, startS)
    expectSixFigures(exhalation!.endS, endS)
    expectSixFigures(exhalation!.endTidalCo2Percent, maximum)
    expectSixFigures(exhalation!.durationS, breath.durationS)
    expectSixFigures(exhalation!.volumeMl, 50 * breath.durationS)
    expect(reading.n).toBe(WINDOW_S * breath.hz)
    expectSixFigures(reading.meanPpb, mean)
    expect(reading.slopePpbPerS).toBeCloseTo(slope, 8)
    expect(reading.changePercent).toBeCloseTo((100 * slope * WINDOW_S) / mean, 8)
    expectSixFigures(reading.gradientPpb, mean - 20)
    expect(analytes[0]).toMatchObject({ nAccepted: 1, valuePpb: null, roomAirPpb: 20 })
    expect(exhalation!.accepted).toBe(true)
  })
})

describe('noise', () => {
  test.each([1, 2, 5, 10, 20, 40].flatMap((size) => [10, 50].map((hz) => ({ size, hz }))))(
    'that alternates by $size ppb at $hz Hz leaves the mean and gives its own spread',
    async ({ size, hz }) => {
      const breath = { ...aBreath, hz, tauS: 0.05, rise: 200 }
      const rows = rowsOf(breath).map((row, i) => ({
        ...row,
        gas: row.gas + (i % 2 ? size : -size),
      }))
      const { exhalations } = await readTrace(csvOfBreath(breath, rows))
      const reading = exhalations[0]!.readings[0]!
      const n = WINDOW_S * hz
      // After 7 s or 140 τ the gas itself stands still: n values of ±size about 220 ppb.
      expectSixFigures(reading.meanPpb, 220)
      expectSixFigures(reading.sdPpb, size * Math.sqrt(n / (n - 1)))
      expectSixFigures(reading.medianPpb, 220)
    },
  )

  test.each(Array.from({ length: 12 }, (_, seed) => ({ seed: 101 + seed })))(
    'of seed $seed on gas and CO2 moves the mean by its own mean and finds one breath',
    async ({ seed }) => {
      const next = seededNoise(seed)
      const breath = { ...aBreath, hz: 20 }
      const noise: number[] = []
      const rows = rowsOf(breath).map((row) => {
        noise.push(25 * next())
        return { ...row, co2: row.co2 + 0.03 * next(), gas: row.gas + noise.at(-1)! }
      })
      const { exhalations } = await readTrace(csvOfBreath(breath, rows))
      // The window's samples are 9 ≤ t < 12 s: numbers 180 to 239 of the file.
      const ofWindow = noise.slice(180, 240)
      const added = ofWindow.reduce((sum, value) => sum + value, 0) / 60
      expect(exhalations).toHaveLength(1)
      expectSixFigures(exhalations[0]!.readings[0]!.meanPpb, plateauOf(breath).mean + added)
    },
  )
})

describe('drift', () => {
  test.each(
    ['isoprene', 'nitric_oxide', 'ammonia'].flatMap((gas) =>
      [-12, -4, 4, 12].map((drift) => ({ gas, drift })),
    ),
  )('of $drift ppb/s in $gas shows as slope and is judged by gas', async ({ gas, drift }) => {
    const breath = { ...aBreath, gas, drift, rise: 200, tauS: 0.05 }
    const { exhalations } = await readTrace(csvOfBreath(breath))
    const { flags, readings } = exhalations[0]!
    // By 7 s the exponential is over: level 220 + drift·s, whose middle lies at 8.45 s.
    const mean = 220 + drift * 8.45
    const change = (100 * drift * WINDOW_S) / mean
    expectSixFigures(readings[0]!.meanPpb, mean)
    expectSixFigures(readings[0]!.slopePpbPerS, drift)
    expectSixFigures(readings[0]!.changePercent, change)
    const flag = flags.find(({ name }) => name === 'PLATEAU_SLOPE')
    if (Math.abs(change) <= 10) expect(flag).toBeUndefined()
    else {
      expect(flag).toMatchObject({
        analyte: gas,
        severity: gas === 'nitric_oxide' ? 'reject' : 'warn',
        limit: 10,
      })
      expectSixFigures(flag!.value, Math.abs(change))
    }
    expect(readings[0]!.accepted).toBe(gas !== 'nitric_oxide' || Math.abs(change) <= 10)
    expect(exhalations[0]!.accepted).toBe(true)
  })
})

describe('a transport delay', () => {
  test.each(
    [-1, -0.35, 0.1, 0.25, 0.5, 1, 1.23, 1.9].flatMap((delayS) =>
      ['file', 'settings'].map((from) => ({ delayS, from })),
    ),
  )('of $delayS s told by the $from is taken out', async ({ delayS, from }) => {
    const breath = { ...aBreath, afterS: 3 }
    const rows = rowsOf(breath, delayS)
    const told = `# isoprene_transport_delay_s: ${delayS}\n`
    const text = csvOfBreath(breath, rows, from === 'file' ? told : '')
    const settings =
      from === 'settings' ? { analytes: { isoprene: { transportDelayS: delayS } } } : {}
    const { exhalations } = await readTrace(text, settings)
    // A wanted instant lies `share` of a step after a recorded sample. The straight line between its
    // neighbours replaces e^(−s/τ) by a mean of two of them, a constant factor close to one.
    const step = 0.1
    const share = (((delayS / step) % 1) + 1) % 1
    const factor =
      Math.exp((share * step) / 1.5) * (1 - share) + Math.exp(((share - 1) * step) / 1.5) * share
    const { mean, slope } = exponentialWindow(
      { level: 500, size: -480 * factor, tau: 1.5, drift: 0 },
      { first: 7, step, n: 30 },
    )
    const reading = exhalations[0]!.readings[0]!
    expectSixFigures(reading.meanPpb, mean)
    expect(reading.slopePpbPerS).toBeCloseTo(slope, 6)
    expectSixFigures(reading.gradientPpb, mean - 20)
  })

  test('told by both is the one of the settings', async () => {
    const text = csvOfBreath(aBreath, rowsOf(aBreath, 0.5), '# isoprene_transport_delay_s: 3\n')
    const { exhalations, analytes } = await readTrace(text, {
      analytes: { isoprene: { transportDelayS: 0.5 } },
    })
    expectSixFigures(exhalations[0]!.readings[0]!.meanPpb, plateauOf(aBreath).mean)
    expect(analytes[0]!.instrument.transportDelayS).toBe(0.5)
  })

  test('that reaches beyond the record leaves no reading and says so', async () => {
    const text = csvOfBreath({ ...aBreath, afterS: 0.5 }, rowsOf({ ...aBreath, afterS: 0.5 }, 2))
    const { exhalations } = await readTrace(text, {
      analytes: { isoprene: { transportDelayS: 2 } },
    })
    expect(exhalations[0]!.readings[0]).toMatchObject({ meanPpb: null, accepted: false })
    expect(exhalations[0]!.flags).toContainEqual(
      expect.objectContaining({ name: 'RANGE', cause: 'incomplete', analyte: 'isoprene' }),
    )
  })
})

describe('a first-order sensor', () => {
  test.each([0.5, 1, 1.5, 2])(
    'of time constant %s s is undone by the inverse filter, and both values are given',
    async (tauS) => {
      const breath = { ...aBreath, hz: 100, rise: 300, tauS }
      const { exhalations } = await readTrace(csvOfBreath(breath), {
        analytes: { isoprene: { inverseFilterS: tauS } },
      })
      const reading = exhalations[0]!.readings[0]!
      // A step to 320 ppb seen through e^(−s/τ): C_m + τ·dC_m/dt is the step itself. At the window's
      // last sample the derivative's right neighbour is room air, which touches 3 of 300 means.
      const last = 320 - 300 * Math.exp(-9.99 / tauS)
      const beforeLast = 320 - 300 * Math.exp(-9.98 / tauS)
      const wrong = last + (tauS * (20 - beforeLast)) / 0.02
      const weights = 1 / 5 + 1 / 4 + 1 / 3
      expect(reading.inverseFilteredMeanPpb).toBeCloseTo(320 + ((wrong - 320) * weights) / 300, 1)
      expectSixFigures(reading.meanPpb, plateauOf(breath).mean)
    },
  )

  test('slower than 2 s is left as measured', async () => {
    const { exhalations } = await readTrace(csvOfBreath(aBreath), {
      analytes: { isoprene: { inverseFilterS: 2.1 } },
    })
    expect(exhalations[0]!.readings[0]!.inverseFilteredMeanPpb).toBeNull()
  })
})
