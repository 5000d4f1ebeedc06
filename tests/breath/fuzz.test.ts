import fc from 'fast-check'
import { expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import { TraceError } from '#shared/breath/TraceError.ts'
import { bytesInChunks } from './support/bytesInChunks.ts'
import { aBreath, csvOfBreath } from './support/syntheticBreath.ts'

/** Reads the bytes; whatever happens must be a result without NaN or Infinity, or a TraceError. */
async function judge(bytes: Uint8Array, cuts: readonly number[] = []): Promise<'read' | 'refused'> {
  try {
    const result = await readTrace(bytesInChunks(bytes, cuts))
    expectNumbers(result)
    return 'read'
  } catch (error) {
    if (!(error instanceof TraceError)) throw error
    expect(error.line).toBeGreaterThanOrEqual(1)
    expect(error.column).toBeGreaterThanOrEqual(1)
    expect(error.reason.length).toBeGreaterThan(10)
    return 'refused'
  }
}

function expectNumbers(value: unknown): void {
  if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true)
  else if (value && typeof value === 'object') Object.values(value).forEach(expectNumbers)
}

const encoder = new TextEncoder()
const good = encoder.encode(`# isoprene_lod_ppb: 3\n${csvOfBreath(aBreath)}`)

test('any bytes are read or refused, and nothing else happens', async () => {
  await fc.assert(
    fc.asyncProperty(fc.uint8Array({ maxLength: 300 }), async (bytes) => {
      expect(await judge(bytes)).toBe('refused')
    }),
    { numRuns: 1500 },
  )
})

test('a good file with bytes changed, cut and moved is read or refused', async () => {
  const change = fc.record({
    at: fc.nat({ max: good.length - 1 }),
    remove: fc.nat({ max: 40 }),
    insert: fc.uint8Array({ maxLength: 12 }),
  })
  await fc.assert(
    fc.asyncProperty(fc.array(change, { minLength: 1, maxLength: 4 }), async (changes) => {
      let bytes = [...good]
      for (const { at, remove, insert } of changes) {
        bytes = [...bytes.slice(0, at), ...insert, ...bytes.slice(at + remove)]
      }
      const cut = Math.min(changes[0]!.at, bytes.length)
      expect(['read', 'refused']).toContain(await judge(Uint8Array.from(bytes), [cut]))
    }),
    { numRuns: 400 },
  )
})

test('any numbers below a good header are read or refused', async () => {
  const number = fc.oneof(
    fc.double({ noNaN: true }).map(String),
    fc.integer({ min: -2, max: 16 }).map(String),
    fc.integer({ min: -100, max: 1500 }).map((hundredths) => String(hundredths / 100)),
    fc.constantFrom('1e308', '-1e308', '5e-324', '0', '-0'),
  )
  const row = fc.tuple(number, number, number, number, number, number)
  await fc.assert(
    fc.asyncProperty(fc.array(row, { maxLength: 30 }), fc.boolean(), async (rows, isTimed) => {
      const header = 'time_s,co2_percent,flow_ml_s,temperature_c,humidity_percent,acetone_ppm'
      const lines = rows.map(([t, ...rest], i) => [isTimed ? i / 10 : t, ...rest].join(','))
      await judge(encoder.encode([header, ...lines].join('\n')))
    }),
    { numRuns: 1500 },
  )
})

test('any plausible shape of CO2 with gases of any size gives finite figures', async () => {
  const co2 = fc.integer({ min: -100, max: 1500 }).map((hundredths) => hundredths / 100)
  const gas = fc.oneof(
    fc.double({ min: -1e300, max: 1e308, noNaN: true }),
    fc.double({ min: 0, max: 1000, noNaN: true }),
  )
  const flow = fc.oneof(fc.constant(50), fc.double({ min: -1e308, max: 1e308, noNaN: true }))
  let read = 0
  await fc.assert(
    fc.asyncProperty(
      fc.array(fc.tuple(fc.integer({ min: 1, max: 12 }), co2, gas, flow), {
        minLength: 2,
        maxLength: 25,
      }),
      async (pieces) => {
        const rows = pieces.flatMap(([count, ...values]) =>
          Array.from({ length: count }, () => values),
        )
        const lines = rows.map((values, i) => [i / 10, ...values].join(','))
        const text = ['time_s,co2_percent,acetone_ppm,flow_ml_s', ...lines].join('\n')
        if ((await judge(encoder.encode(text))) === 'read') read++
      },
    ),
    { numRuns: 600 },
  )
  expect(read).toBeGreaterThan(300)
})
