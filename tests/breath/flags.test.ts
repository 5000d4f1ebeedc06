import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import type { TraceSettings } from '#shared/breath/settings/TraceSettings.ts'
import type { Exhalation, FlagName } from '#shared/breath/TraceResult.ts'
import { expectSixFigures } from './support/sixFigures.ts'
import { air, breath, type Piece, type StepOptions, stepTrace } from './support/stepTrace.ts'

async function exhalationOf(
  pieces: Piece[],
  options: StepOptions = {},
  settings: Partial<TraceSettings> = {},
): Promise<Exhalation> {
  const { exhalations } = await readTrace(stepTrace(pieces, options), settings)
  expect(exhalations).toHaveLength(1)
  return exhalations[0]!
}

const named = (exhalation: Exhalation, name: FlagName) =>
  exhalation.flags.filter((flag) => flag.name === name)

test('a good exhalation has no flags', async () => {
  const found = await exhalationOf([air(3), breath(10), air(3)])
  expect(found.flags).toEqual([])
  expect(found).toMatchObject({ accepted: true, readings: [{ accepted: true, meanPpb: 500 }] })
})

describe('FLOW', () => {
  test.each([45, 55])('accepts a whole window at the bound of %s mL/s', async (flow) => {
    const found = await exhalationOf([air(3), breath(10, { flow }), air(3)])
    expect(named(found, 'FLOW').map(({ cause }) => cause)).toEqual(['flow-mean'])
  })

  test('accepts three of thirty samples outside: 10 % is not more than 10 %', async () => {
    const found = await exhalationOf([air(3), breath(9.7), breath(0.3, { flow: 30 }), air(3)])
    expect(named(found, 'FLOW')).toEqual([])
  })

  test.each([0.4, 1, 2])('rejects when %s s of the window lie outside', async (seconds) => {
    const found = await exhalationOf([
      air(3),
      breath(10 - seconds),
      breath(seconds, { flow: 60 }),
      air(3),
    ])
    expect(named(found, 'FLOW')).toEqual([
      expect.objectContaining({ severity: 'reject', analyte: null, limit: 10, unit: '%' }),
    ])
    expectSixFigures(named(found, 'FLOW')[0]!.value, (100 * seconds) / 3)
    expect(found.accepted).toBe(false)
  })

  test.each([
    [47, 47.5],
    [53, 52.5],
  ])('warns at a mean of %s mL/s, beyond %s', async (flow, limit) => {
    const found = await exhalationOf([air(3), breath(10, { flow }), air(3)])
    expect(named(found, 'FLOW')).toEqual([
      expect.objectContaining({ severity: 'warn', value: flow, limit, unit: 'mL/s' }),
    ])
    expect(found.accepted).toBe(true)
  })

  test('takes its target from the protocol', async () => {
    const pieces = [air(3), breath(10, { flow: 300 }), air(3)]
    expect(named(await exhalationOf(pieces), 'FLOW')[0]!.severity).toBe('reject')
    expect(named(await exhalationOf(pieces, {}, { targetFlowMlS: 300 }), 'FLOW')).toEqual([])
  })
})

describe('PRESS', () => {
  test.each([4.9, 20.1])('rejects %s cmH2O for longer than 0.5 s', async (pressure) => {
    const found = await exhalationOf([
      air(3),
      breath(4),
      breath(0.6, { pressure }),
      breath(5),
      air(3),
    ])
    expect(named(found, 'PRESS')).toEqual([
      expect.objectContaining({ severity: 'reject', limit: 0.5, unit: 's' }),
    ])
    expectSixFigures(named(found, 'PRESS')[0]!.value, 0.6)
  })

  test('allows half a second, twice, and the bounds themselves', async () => {
    const found = await exhalationOf([
      air(3),
      breath(2, { pressure: 5 }),
      breath(0.5, { pressure: 3 }),
      breath(2, { pressure: 20 }),
      breath(0.5, { pressure: 30 }),
      breath(4),
      air(3),
    ])
    expect(named(found, 'PRESS')).toEqual([])
  })
})

describe('CO2', () => {
  test.each([
    [2.9, 3],
    [3, 4],
    [3.9, 4],
  ])('end-tidal %s %% warns below %s %% and never rejects', async (co2, limit) => {
    const found = await exhalationOf([air(3), breath(10, { co2 }), air(3)])
    expect(named(found, 'CO2_LOW')).toEqual([
      expect.objectContaining({ severity: 'warn', value: co2, limit, unit: '%' }),
    ])
    expect(found.accepted).toBe(true)
  })

  test('end-tidal 4 to 6.5 % is silent, above it warns', async () => {
    for (const co2 of [4, 6.5]) {
      expect((await exhalationOf([air(3), breath(10, { co2 }), air(3)])).flags).toEqual([])
    }
    const found = await exhalationOf([air(3), breath(10, { co2: 6.6 }), air(3)])
    expect(named(found, 'CO2_HIGH')[0]).toMatchObject({ severity: 'warn', value: 6.6, limit: 6.5 })
  })

  test.each([
    [0.2, null],
    [0.21, 'warn'],
    [0.5, 'warn'],
    [0.51, 'reject'],
  ])('inspired %s %% gives the verdict %s', async (co2, severity) => {
    const found = await exhalationOf([air(3, { co2 }), breath(10), air(3, { co2 })])
    expectSixFigures(found.inspiredCo2Percent, co2)
    expect(named(found, 'REBREATHE').map((flag) => flag.severity)).toEqual(
      severity ? [severity] : [],
    )
    expect(found.accepted).toBe(severity !== 'reject')
  })

  test('inspired is the 5th percentile, between two samples on a straight line', async () => {
    // 161 samples: rank 8 of 0.1, 0.2, … in order is 0.9 %.
    const steps = Array.from({ length: 61 }, (_, i) => air(0.1, { co2: 0.01 * (i + 1) }))
    const found = await exhalationOf([...steps, breath(10)], {}, { roomAirDistanceS: 0 })
    expectSixFigures(found.inspiredCo2Percent, 0.09)
    const more = await exhalationOf([...steps, breath(10.4)], {}, { roomAirDistanceS: 0 })
    // 165 samples: rank 8.2.
    expectSixFigures(more.inspiredCo2Percent, 0.092)
  })
})

describe('AMBIENT', () => {
  test.each([
    [500, 400, true, 460],
    [460, 400, true, 460],
    [459, 400, false, 460],
    [400, 400, false, 400],
    [300, 400, false, 400],
  ])('%s ppb in room air of %s: silent is %s', async (gas, room, isSilent, limit) => {
    const found = await exhalationOf([
      air(3, { gas: room }),
      breath(10, { gas }),
      air(3, { gas: room }),
    ])
    const flags = named(found, 'AMBIENT')
    if (isSilent) expect(flags).toEqual([])
    else {
      expect(flags).toEqual([
        expect.objectContaining({ severity: 'warn', analyte: 'isoprene', value: gas }),
      ])
      expectSixFigures(flags[0]!.limit, limit)
    }
    expect(found.readings[0]!.accepted).toBe(true)
    expectSixFigures(found.readings[0]!.gradientPpb || 1, gas - room || 1)
  })

  test('is never raised for carbonyl sulfide', async () => {
    const pieces = [air(3, { gas: 400 }), breath(10, { gas: 300 }), air(3, { gas: 400 })]
    const found = await exhalationOf(pieces, { gas: 'carbonyl_sulfide' })
    expect(found.flags).toEqual([])
    expect(found.readings[0]!.gradientPpb).toBe(-100)
  })

  test.each([0.2, 0.4])('room air of %s s remains beside a disturbed second', async (seconds) => {
    const disturbed = air(1, { gas: 9000 })
    for (const pieces of [
      [air(seconds), disturbed, breath(10), disturbed],
      [disturbed, breath(10), disturbed, air(seconds)],
    ]) {
      expect((await readTrace(stepTrace(pieces))).analytes[0]!.roomAirPpb).toBe(20)
    }
  })

  test('room air leaves out the second beside an exhalation, and may be measured apart', async () => {
    const pieces = [air(3), air(1, { gas: 9000 }), breath(10), air(1, { gas: 9000 }), air(3)]
    const text = stepTrace(pieces)
    expect((await readTrace(text)).analytes[0]!.roomAirPpb).toBe(20)
    const apart = await readTrace(text, { analytes: { isoprene: { roomAirPpb: 7 } } })
    expect(apart.analytes[0]!.roomAirPpb).toBe(7)
    expect(apart.exhalations[0]!.readings[0]!.gradientPpb).toBe(493)
  })
})

describe('RANGE', () => {
  const pieces = [air(3), breath(10), air(3)]
  // The exhalation lasts from 3 to 13 s, its window from 10 to 13 s.

  test.each([
    [4, 4.3],
    [10.5, 10.9],
    [11, 12],
    [2.8, 3.3],
    [12.8, 13.3],
  ])(
    'a gap from %s to %s s rejects the reading of each gas, not the exhalation',
    async (from, to) => {
      const found = await exhalationOf(pieces, { without: (t) => t >= from && t < to })
      const flags = named(found, 'RANGE')
      expect(flags).toEqual([
        expect.objectContaining({
          cause: 'gap',
          severity: 'reject',
          analyte: 'isoprene',
          limit: 0.3,
        }),
      ])
      expectSixFigures(flags[0]!.value, to - from + 0.1)
      expect(found.readings[0]!.accepted).toBe(false)
    },
  )

  test.each([
    [4, 4.2],
    [11, 11.2],
    [12.5, 12.7],
  ])('a step of 0.3 s from %s to %s s is no gap', async (from, to) => {
    const found = await exhalationOf(pieces, { without: (t) => t >= from && t < to })
    expect(named(found, 'RANGE')).toEqual([])
    expect(found.window!.n).toBe(from < 10 ? 30 : 28)
    expect(found.readings[0]).toMatchObject({ meanPpb: 500, accepted: true })
  })

  test.each([
    [0.5, 1.5],
    [14.5, 15.5],
  ])('a gap in room air, %s to %s s, is none of ours', async (from, to) => {
    const found = await exhalationOf(pieces, { without: (t) => t >= from && t < to })
    expect(found.flags).toEqual([])
  })

  test('a gap across the rise is not interpolated: the exhalation starts at its first sample', async () => {
    const found = await exhalationOf(pieces, { without: (t) => t >= 2.8 && t < 3.5 })
    expect(found.startS).toBe(3.5)
  })

  test.each([500, 499.9, 300])(
    'a channel that ends at %s ppb is saturated',
    async (rangeMaxPpb) => {
      const gas = Math.min(500, rangeMaxPpb)
      const comments = `# isoprene_range_max_ppb: ${rangeMaxPpb}\n`
      const found = await exhalationOf([air(3), breath(10, { gas }), air(3)], { comments })
      expect(named(found, 'RANGE')).toEqual([
        expect.objectContaining({
          cause: 'saturated',
          severity: 'reject',
          value: gas,
          limit: rangeMaxPpb,
        }),
      ])
      expect(found).toMatchObject({ accepted: true, readings: [{ accepted: false, meanPpb: gas }] })
    },
  )

  test('one saturated sample in the window suffices, before the window none does', async () => {
    const settings = { analytes: { isoprene: { rangeMaxPpb: 1000 } } }
    const peak = breath(0.1, { gas: 1000 })
    const inside = await exhalationOf([air(3), breath(8), peak, breath(1.9), air(3)], {}, settings)
    expect(named(inside, 'RANGE')).toHaveLength(1)
    const before = await exhalationOf([air(3), breath(5), peak, breath(4.9), air(3)], {}, settings)
    expect(named(before, 'RANGE')).toEqual([])
  })

  test('a saturated sample counts where alignment has interpolated it away', async () => {
    const settings = { analytes: { isoprene: { rangeMaxPpb: 1000, transportDelayS: 0.05 } } }
    const peak = breath(0.1, { gas: 1000 })
    const found = await exhalationOf([air(3), breath(8), peak, breath(1.9), air(3)], {}, settings)
    expect(named(found, 'RANGE')[0]).toMatchObject({ cause: 'saturated', value: 1000 })
  })

  test('a saturated sample after the exhalation counts where the last one leans on it', async () => {
    const settings = { analytes: { isoprene: { rangeMaxPpb: 1000, transportDelayS: 0.05 } } }
    const after = [air(0.1, { gas: 1000 }), air(3)]
    const found = await exhalationOf([air(3), breath(10), ...after], {}, settings)
    expect(named(found, 'RANGE')[0]).toMatchObject({ cause: 'saturated', value: 1000 })
  })

  test('a delayed gas is not interpolated across a gap after the exhalation', async () => {
    const settings = { analytes: { isoprene: { transportDelayS: 1 } } }
    const without = (t: number) => t >= 13.5 && t < 14
    const found = await exhalationOf(pieces, { without }, settings)
    expect(named(found, 'RANGE').map(({ cause }) => cause)).toEqual(['incomplete'])
    expect(found.readings[0]).toMatchObject({ meanPpb: null, accepted: false })
  })

  test('a gap adds no volume beyond one step', async () => {
    const found = await exhalationOf(pieces, { without: (t) => t >= 5 && t < 6 })
    expectSixFigures(found.volumeMl, 450)
    expectSixFigures(found.durationS, 9)
  })

  test('a reading below the limit of detection is kept as measured and marked', async () => {
    const comments = '# isoprene_lod_ppb: 600\n'
    const found = await exhalationOf(pieces, { comments })
    expect(named(found, 'RANGE')).toEqual([
      expect.objectContaining({
        cause: 'below-detection',
        severity: 'warn',
        value: 500,
        limit: 600,
      }),
    ])
    expect(found.readings[0]).toMatchObject({ meanPpb: 500, censored: true, accepted: true })
  })
})

describe('LAG', () => {
  test.each([
    [2, null, 0],
    [2.1, 'warn', 2],
    [3.3, 'warn', 2],
    [3.4, 'reject', 10 / 3],
  ])('a rise of %s s in 10 s gives the verdict %s', async (rise, severity, limit) => {
    const comments = `# isoprene_response_t10_90_s: ${rise}\n`
    const found = await exhalationOf([air(3), breath(10), air(3)], { comments })
    const flags = named(found, 'LAG')
    expect(flags.map((flag) => flag.severity)).toEqual(severity ? [severity] : [])
    if (severity) expectSixFigures(flags[0]!.limit, limit)
    expect(found.accepted).toBe(true)
    expect(found.readings[0]!.accepted).toBe(severity !== 'reject')
  })
})

describe('SENSOR', () => {
  const good = { zeroPassed: true, spanPassed: true, resonancePassed: null, ageH: 24 }
  test.each([
    [good, []],
    [{ ...good, ageH: 24.5 }, ['warn']],
    [{ ...good, spanPassed: false }, ['reject']],
    [{ ...good, zeroPassed: false, resonancePassed: false, ageH: 30 }, ['reject']],
  ])('a check of %o gives %o', async (sensorCheck, severities) => {
    const found = await exhalationOf([air(3), breath(10), air(3)], {}, { sensorCheck })
    expect(named(found, 'SENSOR').map((flag) => flag.severity)).toEqual(severities)
    expect(found.accepted).toBe(!severities.includes('reject'))
  })
})

describe('volume at body temperature', () => {
  const pieces = [air(3), breath(10), air(3)]
  // Factors by the WMO formula, computed by hand; published tables print 1.102 and 1.091 for 20 and 22 °C.
  test.each([
    [20, undefined, 1.10176],
    [22, undefined, 1.09093],
    [25, 100, 1.07423],
    [30, undefined, 1.04496],
    [20, 50, 1.11474],
  ])(
    'from %s °C at %s %% humidity is 500 mL times %s',
    async (temperatureC, humidityPercent, factor) => {
      const found = await exhalationOf(pieces, { temperatureC, humidityPercent })
      expectSixFigures(found.volumeMl, 500)
      expect(found.volumeBtpsMl! / 500).toBeCloseTo(factor, 5)
    },
  )

  test.each([
    [-300, undefined],
    [61, undefined],
    [25, -1],
  ])(
    'is left out at %s °C and %s %% humidity, which cannot be',
    async (temperatureC, humidityPercent) => {
      const found = await exhalationOf(pieces, { temperatureC, humidityPercent })
      expect(found.volumeBtpsMl).toBeNull()
    },
  )
})

test('PLATEAU_SHORT rejects where CO2 reaches 80 % of its end too late', async () => {
  const pieces = [air(3), breath(7.5, { co2: 3.9 }), breath(2.5, { co2: 5 }), air(3)]
  const found = await exhalationOf(pieces)
  expectSixFigures(found.phaseThreeS, 2.5)
  expect(found.window!.n).toBe(30)
  expect(named(found, 'PLATEAU_SHORT')[0]).toMatchObject({ severity: 'reject', limit: 3 })
})

test('the end of phase III is dropped where the protocol says a valve disturbs it', async () => {
  const found = await exhalationOf([air(3), breath(10), air(3)], {}, { valveArtefactS: 0.2 })
  expectSixFigures(found.phaseThreeS, 10 - 3 - 0.2)
  expect(found.window!.n).toBe(30)
})
