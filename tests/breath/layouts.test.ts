import { createReadStream, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { readColumns } from '#shared/breath/file/readColumns.ts'
import { readTrace } from '#shared/breath/readTrace.ts'
import { bytesInChunks } from './support/bytesInChunks.ts'
import { csvOf } from './support/csvOf.ts'
import { exponentialWindow } from './support/exponentialWindow.ts'
import { expectSixFigures } from './support/sixFigures.ts'
import { aBreath, csvOfBreath, rowsOf } from './support/syntheticBreath.ts'

const text = csvOfBreath(aBreath)
const { mean } = exponentialWindow(
  { level: 500, size: -480, tau: 1.5, drift: 0 },
  { first: 7, step: 0.1, n: 30 },
)

async function expectRightlyRead(source: string | AsyncIterable<Uint8Array>) {
  const { exhalations, samples } = await readTrace(source)
  expect(samples).toBe(141)
  expectSixFigures(exhalations[0]!.readings[0]!.meanPpb, mean)
}

describe('the same trace is read rightly', () => {
  test.each([
    ['with a byte order mark', `\uFEFF${text}`],
    ['with carriage returns and line feeds', text.replaceAll('\n', '\r\n')],
    ['without a last line feed', text.trimEnd()],
    ['with empty lines at the end', `${text}\n\r\n \n`],
    ['with blanks around cells', text.replaceAll(',', ' ,\t ')],
    ['with blanks around lines', text.replaceAll('\n', '  \n ').trimEnd()],
    ['with exponents', text.replaceAll(',50,', ',5.0E+1,')],
    ['with signs', text.replaceAll(',50,', ',+50,')],
    ['with leading noughts', text.replaceAll(',50,', ',0050,')],
    ['with bare points', text.replaceAll(',50,', ',50.,')],
    [
      'with every listed key',
      `# instrument_serial: A-17\n#started_at:2025-03-04T09:30:00+01:00\n#  firmware  :  2.1 β\n# isoprene_lod_ppb: 3\n# isoprene_range_max_ppb: 1e4\n# isoprene_response_t10_90_s: 0.4\n# isoprene_transport_delay_s: 0\n${text}`,
    ],
    ['with comments after the header', text.replace('\n', '\n# firmware: 3\n')],
  ])('%s', async (_how, file) => expectRightlyRead(file))

  test('with its columns in another order', async () => {
    const rows = rowsOf(aBreath).map(({ t, co2, flow, gas }) => [gas, flow, t, co2])
    await expectRightlyRead(csvOf(['isoprene_ppb', 'flow_ml_s', 'time_s', 'co2_percent'], rows))
  })

  test('in ppm', async () => {
    const rows = rowsOf(aBreath).map(({ t, co2, flow, gas }) => [t, co2, flow, gas / 1000])
    await expectRightlyRead(csvOf(['time_s', 'co2_percent', 'flow_ml_s', 'isoprene_ppm'], rows))
  })

  test.each([-1000, 0.05, 86_400, 1_735_689_600])(
    'with a clock that starts at %s s',
    async (start) => {
      const rows = rowsOf(aBreath).map(({ t, co2, flow, gas }) => [
        (start + t).toFixed(2),
        co2,
        flow,
        gas,
      ])
      await expectRightlyRead(csvOf(['time_s', 'co2_percent', 'flow_ml_s', 'isoprene_ppb'], rows))
    },
  )

  test('from a file in a stream', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'breathmark-trace-'))
    try {
      const path = join(folder, 'trace.csv')
      writeFileSync(path, text)
      await expectRightlyRead(createReadStream(path, { highWaterMark: 17 }))
    } finally {
      rmSync(folder, { recursive: true })
    }
  })
})

test('what the keys say of the recording is kept as written', async () => {
  const { recording } = await readTrace(
    `# instrument_serial: A-17\n# started_at: 2025-03-04T09:30:00.5+01:00\n# firmware: 2.1 β\n${text}`,
  )
  expect(recording).toEqual({
    instrumentSerial: 'A-17',
    startedAt: '2025-03-04T09:30:00.5+01:00',
    firmware: '2.1 β',
  })
})

describe('chunks', () => {
  const bytes = new TextEncoder().encode(`\uFEFF# firmware: 2.1 β€😀\r\n${text}`)

  test('of one byte each read as the whole', async () => {
    const cuts = Array.from({ length: bytes.length - 1 }, (_, i) => i + 1)
    const one = await readTrace(bytesInChunks(bytes, cuts))
    expect(one).toEqual(await readTrace(bytesInChunks(bytes, [])))
    expect(one.recording.firmware).toBe('2.1 β€😀')
  })

  test('cut anywhere read as the whole, also inside a character, a line end and the mark', async () => {
    const whole = await readTrace(bytesInChunks(bytes, []))
    const head = Array.from({ length: 60 }, (_, i) => i + 1)
    for (const cut of head) {
      expect(await readTrace(bytesInChunks(bytes, [cut]))).toEqual(whole)
    }
    const cuts = fc.uniqueArray(fc.integer({ min: 0, max: bytes.length }), { maxLength: 20 })
    await fc.assert(
      fc.asyncProperty(cuts, async (places) => {
        const ascending = [...places].sort((a, b) => a - b)
        expect(await readTrace(bytesInChunks(bytes, ascending))).toEqual(whole)
      }),
      { numRuns: 60 },
    )
  })

  test('cut anywhere refuse at the same place for the same reason', async () => {
    const bad = new TextEncoder().encode(text.replace('\n9,', '\n9;'))
    const whole = await readTrace(bytesInChunks(bad, [])).catch((error: unknown) => error)
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: bad.length }), async (cut) => {
        const outcome = await readTrace(bytesInChunks(bad, [cut])).catch((error: unknown) => error)
        expect(outcome).toEqual(whole)
      }),
      { numRuns: 60 },
    )
  })

  test('given out of a larger buffer are read at their place in it', async () => {
    const plain = new TextEncoder().encode(text)
    const larger = new Uint8Array(plain.length + 20).fill(65)
    larger.set(plain, 7)
    await expectRightlyRead(bytesInChunks(larger.subarray(7, 7 + plain.length), []))
  })
})

test('a text is sliced without splitting a character', async () => {
  // The text is encoded in slices of 65,536 code units: the pair of 😀 lies across the first end.
  const start = '# instrument_serial: A\n# firmware:'.padEnd(40_000)
  const file = `${start.replace('A\n', `A${' '.repeat(25_535)}\n`)}😀\n${text}`
  expect(file.indexOf('😀')).toBe(65_535)
  expect((await readTrace(file)).recording.firmware).toBe('😀')
})

test('one chunk of many lines is read as many', async () => {
  const rows = rowsOf({ ...aBreath, afterS: 2000 })
  const bytes = new TextEncoder().encode(csvOfBreath(aBreath, rows))
  expect(bytes.length).toBeGreaterThan(200_000)
  expect((await readColumns(bytesInChunks(bytes, []))).timeS).toHaveLength(rows.length)
})

test('two hundred thousand rows are read in their order, and every number is kept', async () => {
  const count = 200_000
  async function* rows() {
    const encoder = new TextEncoder()
    yield encoder.encode('time_s,co2_percent,acetone_ppb\n')
    for (let from = 0; from < count; from += 1000) {
      let block = ''
      for (let i = from; i < from + 1000; i++) block += `${i / 100},${(i % 500) / 100},${i}\n`
      yield encoder.encode(block)
    }
  }
  const columns = await readColumns(rows())
  expect(columns.timeS).toHaveLength(count)
  expect(columns.timeS.every((t, i) => t === i / 100)).toBe(true)
  expect(columns.co2Percent.every((co2, i) => co2 === (i % 500) / 100)).toBe(true)
  expect(columns.gases[0]!.ppb.every((ppb, i) => ppb === i)).toBe(true)
})
