import { describe, expect, test } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import { bytesInChunks } from './support/bytesInChunks.ts'
import { csvOf } from './support/csvOf.ts'
import { aBreath, csvOfBreath, HEADER, rowsOf } from './support/syntheticBreath.ts'
import { traceErrorOf } from './support/traceErrorOf.ts'

const lines = csvOfBreath(aBreath).trimEnd().split('\n')
const header = lines[0]!
const numbers = lines.slice(1)

/** The good trace with one cell replaced; data line 1 is line 2 of the file. */
function withCell(line: number, column: number, cell: string): string {
  const changed = [...lines]
  const cells = changed[line - 1]!.split(',')
  cells[column - 1] = cell
  changed[line - 1] = cells.join(',')
  return `${changed.join('\n')}\n`
}

const asFile = (...parts: string[]) => `${parts.join('\n')}\n`
const bytesOf = (...parts: (string | number[])[]) =>
  Uint8Array.from(
    parts.flatMap((part) =>
      typeof part === 'string' ? [...new TextEncoder().encode(part)] : part,
    ),
  )

type Refused = [what: string, text: string, line: number, column: number, reason: RegExp]

const emptyFiles: Refused[] = [
  ['an empty file', '', 1, 1, /no header/],
  ['a byte order mark alone', '\uFEFF', 1, 1, /no header/],
  ['empty lines alone', '\n\n\n', 3, 1, /no header/],
  ['comments alone', '# firmware: 1.2\n', 1, 1, /no header/],
  ['a header alone', `${header}\n`, 1, 1, /no numbers/],
  ['a header alone without a line end', header, 1, 1, /no numbers/],
  ['a single sample', asFile(header, numbers[0]!), 2, 1, /single sample/],
]

const headers: Refused[] = [
  ['no time', asFile('co2_percent,acetone_ppb', '4,3'), 1, 1, /time_s is missing/],
  ['no CO2', asFile('time_s,acetone_ppb', '4,3'), 1, 1, /co2_percent is missing/],
  ['no gas', asFile('time_s,co2_percent,flow_ml_s', '4,3,2'), 1, 1, /no gas/],
  ['no header at all', asFile('0,0.04,20', '0.1,0.04,20'), 1, 1, /not known/],
  ['capitals', asFile('Time_s,co2_percent,acetone_ppb'), 1, 1, /small letters/],
  ['a capital unit', asFile('time_s,co2_percent,acetone_PPB'), 1, 3, /small letters/],
  ['a quoted name', asFile('time_s,"co2_percent",acetone_ppb'), 1, 2, /quot/],
  ['an unnamed column', asFile('time_s,co2_percent,,acetone_ppb'), 1, 3, /no name/],
  ['a last comma', asFile('time_s,co2_percent,acetone_ppb,'), 1, 4, /no name/],
  ['semicolons', asFile('time_s;co2_percent;acetone_ppb'), 1, 1, /semicolons/],
  ['tabs', asFile('time_s\tco2_percent\tacetone_ppb'), 1, 1, /tabs/],
  ['a further column', asFile('time_s,co2_percent,acetone_ppb,operator'), 1, 4, /not known/],
  ['a mass concentration', asFile('time_s,co2_percent,acetone_ug_m3'), 1, 3, /not known/],
  ['litres a minute', asFile('time_s,co2_percent,acetone_ppb,flow_l_min'), 1, 4, /not known/],
  ['milliseconds', asFile('time_ms,co2_percent,acetone_ppb'), 1, 1, /not known/],
  ['CO2 in ppm', asFile('time_s,co2_ppm,acetone_ppb'), 1, 2, /percent/],
  ['CO2 in mmHg', asFile('time_s,co2_mmhg,acetone_ppb'), 1, 2, /percent/],
  ['a gas twice', asFile('time_s,co2_percent,acetone_ppb,acetone_ppb'), 1, 4, /already/],
  ['a gas in ppb and ppm', asFile('time_s,co2_percent,acetone_ppm,acetone_ppb'), 1, 4, /already/],
  ['time twice', asFile('time_s,co2_percent,acetone_ppb,time_s'), 1, 4, /already/],
  ['a gas without a name', asFile('time_s,co2_percent,_ppb'), 1, 3, /not known/],
  ['a gas with a hyphen', asFile('time_s,co2_percent,di-acetyl_ppb'), 1, 3, /not known/],
  ['no-break spaces', asFile('time_s,\u00A0co2_percent,acetone_ppb'), 1, 2, /not known/],
]

const cells: Refused[] = [
  ['an empty cell', withCell(5, 3, ''), 5, 3, /empty/],
  ['a blank cell', withCell(5, 3, '  '), 5, 3, /empty/],
  ['a quoted cell', withCell(7, 2, '"0.04"'), 7, 2, /quot/],
  ['a word', withCell(9, 4, 'high'), 9, 4, /plain decimal/],
  ['a person', withCell(9, 4, 'Jane Doe'), 9, 4, /plain decimal/],
  ['NaN', withCell(9, 4, 'NaN'), 9, 4, /plain decimal/],
  ['Infinity', withCell(9, 4, 'Infinity'), 9, 4, /plain decimal/],
  ['a negative infinity', withCell(9, 4, '-Infinity'), 9, 4, /plain decimal/],
  ['a number beyond doubles', withCell(9, 4, '1e400'), 9, 4, /too large/],
  ['hexadecimal', withCell(9, 4, '0x1F'), 9, 4, /plain decimal/],
  ['octal', withCell(9, 4, '0o17'), 9, 4, /plain decimal/],
  ['digits in groups', withCell(9, 4, '1 000'), 9, 4, /plain decimal/],
  ['an underscore', withCell(9, 4, '1_000'), 9, 4, /plain decimal/],
  ['two points', withCell(9, 4, '1.2.3'), 9, 4, /plain decimal/],
  ['two signs', withCell(9, 4, '--1'), 9, 4, /plain decimal/],
  ['a lone sign', withCell(9, 4, '-'), 9, 4, /plain decimal/],
  ['a lone point', withCell(9, 4, '.'), 9, 4, /plain decimal/],
  ['an exponent without digits', withCell(9, 4, '1e'), 9, 4, /plain decimal/],
  ['a unit', withCell(9, 4, '20 ppb'), 9, 4, /plain decimal/],
  ['digits of another script', withCell(9, 4, '٣'), 9, 4, /plain decimal/],
  ['a minus of typography', withCell(9, 4, '−3'), 9, 4, /plain decimal/],
  ['a cell too few', asFile(header, ...numbers.slice(0, 4), '0.4,0.04,0'), 6, 4, /3 cells/],
  ['a cell too many', withCell(9, 4, '20,1'), 9, 5, /more cells/],
  ['a last comma in a line', withCell(9, 4, '20,'), 9, 5, /more cells/],
  ['comma decimals', withCell(4, 2, '0,04'), 4, 5, /decimal sign/],
  [
    'comma decimals throughout',
    asFile(header, ...numbers.map((line) => line.replaceAll('.', ','))),
    2,
    5,
    /decimal sign/,
  ],
  [
    'comma decimals between semicolons',
    asFile(header, ...numbers.map((line) => line.replaceAll(',', ';').replaceAll('.', ','))),
    2,
    1,
    /semicolons/,
  ],
  ['tabs between numbers', withCell(3, 1, '0.1\t0.04'), 3, 1, /tabs/],
]

const layout: Refused[] = [
  ['an empty line in front', `\n${csvOfBreath(aBreath)}`, 1, 1, /line is empty/],
  ['an empty line after the header', asFile(header, '', ...numbers), 2, 1, /line is empty/],
  [
    'an empty line among numbers',
    asFile(header, ...numbers.slice(0, 9), '', ...numbers.slice(9)),
    11,
    1,
    /line is empty/,
  ],
  [
    'a blank line among numbers',
    asFile(header, ...numbers.slice(0, 9), ' \t', '', ...numbers.slice(9)),
    11,
    1,
    /line is empty/,
  ],
  [
    'a comment among numbers',
    asFile(header, ...numbers.slice(0, 9), '# firmware: 1', ...numbers.slice(9)),
    11,
    1,
    /before the numbers/,
  ],
  [
    'a comment at the end',
    asFile(header, ...numbers, '# firmware: 1'),
    lines.length + 1,
    1,
    /before the numbers/,
  ],
  ['a header again', asFile(header, ...numbers, header), lines.length + 1, 1, /plain decimal/],
  ['carriage returns alone', lines.join('\r'), 1, 1, /carriage return/i],
  ['carriage returns alone in long', lines.join('\r').repeat(20), 1, 1, /carriage return/i],
  ['a lone carriage return in a line', withCell(4, 3, '0\r'), 4, 3, /carriage return/i],
  [
    'a lone carriage return at the end',
    `${lines.join('\n')}\r`,
    lines.length,
    4,
    /carriage return/i,
  ],
  ['a line without end', `${'9'.repeat(70_000)}`, 1, 1, /longer than/],
]

const comments: Refused[] = [
  ['no key', `# a note\n${csvOfBreath(aBreath)}`, 1, 1, /a key, a colon and a value/],
  ['a key that is not listed', `# operator: 7\n${csvOfBreath(aBreath)}`, 1, 1, /not allowed/],
  ['a capital key', `# firmware: 1\n# Firmware: 2\n${csvOfBreath(aBreath)}`, 2, 1, /not allowed/],
  ['no value', `# firmware:\n${csvOfBreath(aBreath)}`, 1, 1, /no value/],
  ['a key twice', `# firmware: 1\n# firmware: 1\n${csvOfBreath(aBreath)}`, 2, 1, /twice/],
  ['a long value', `# firmware: ${'x'.repeat(65)}\n${csvOfBreath(aBreath)}`, 1, 1, /at most 64/],
  ['a hidden character', `# firmware: a\u200Bb\n${csvOfBreath(aBreath)}`, 1, 1, /visible/],
  [
    'a start without offset',
    `# started_at: 2025-03-04T09:30:00\n${csvOfBreath(aBreath)}`,
    1,
    1,
    /offset/,
  ],
  ['a start without a time', `# started_at: 2025-03-04\n${csvOfBreath(aBreath)}`, 1, 1, /offset/],
  [
    'a day that the calendar lacks',
    `# started_at: 2025-02-29T09:30:00Z\n${csvOfBreath(aBreath)}`,
    1,
    1,
    /offset/,
  ],
  [
    'a limit that is no number',
    `# isoprene_lod_ppb: low\n${csvOfBreath(aBreath)}`,
    1,
    1,
    /plain decimal/,
  ],
  ['a limit below nought', `# isoprene_lod_ppb: -1\n${csvOfBreath(aBreath)}`, 1, 1, /negative/],
  [
    'a limit twice',
    `# isoprene_lod_ppb: 1\n# isoprene_lod_ppb: 2\n${csvOfBreath(aBreath)}`,
    2,
    1,
    /twice/,
  ],
  [
    'a gas that has no column',
    `# firmware: 1\n# jane_doe_lod_ppb: 3\n${csvOfBreath(aBreath)}`,
    2,
    1,
    /no column/,
  ],
  [
    'a gas that has no column, after the header',
    asFile(header, '# acetone_lod_ppb: 3', ...numbers),
    2,
    1,
    /no column/,
  ],
  [
    'a delay beyond 5 s',
    `# isoprene_transport_delay_s: 5.1\n${csvOfBreath(aBreath)}`,
    2,
    4,
    /beyond 5 s/,
  ],
]

const clock: Refused[] = [
  ['that stands still', withCell(30, 1, '2.7'), 30, 1, /after the one before/],
  ['that goes back', withCell(30, 1, '1.4'), 30, 1, /after the one before/],
  ['that starts again', asFile(header, ...numbers, ...numbers), lines.length + 1, 1, /after/],
  ['slower than ten a second', csvOfBreath({ ...aBreath, hz: 8 }), 3, 1, /ten samples a second/],
]

const implausible: Refused[] = [
  ['CO2 below −1 %', withCell(20, 2, '-1.01'), 20, 2, /below -1/],
  ['CO2 above 15 %', withCell(40, 2, '15.01'), 40, 2, /above 15/],
  [
    'CO2 in mmHg',
    csvOf(
      HEADER('isoprene'),
      rowsOf(aBreath).map(({ t, co2, flow, gas }) => [t, co2 * 7.6, flow, gas]),
    ),
    25,
    2,
    /mmHg/,
  ],
  [
    'CO2 as a fraction',
    csvOf(
      HEADER('isoprene'),
      rowsOf(aBreath).map(({ t, co2, flow, gas }) => [t, co2 / 100, flow, gas]),
    ),
    121,
    2,
    /fraction/,
  ],
]

describe('a file is refused for', () => {
  test.each(emptyFiles)('%s', refuses)
})
describe('a header is refused for', () => {
  test.each(headers)('%s', refuses)
})
describe('a line of numbers is refused for', () => {
  test.each(cells)('%s', refuses)
})
describe('the layout is refused for', () => {
  test.each(layout)('%s', refuses)
})
describe('a comment is refused for', () => {
  test.each(comments)('%s', refuses)
})
describe('a clock is refused', () => {
  test.each(clock)('%s', refuses)
})
describe('implausible numbers are refused:', () => {
  test.each(implausible)('%s', refuses)
})

async function refuses(_what: string, text: string, line: number, column: number, reason: RegExp) {
  const error = await traceErrorOf(text)
  expect({ line: error.line, column: error.column }).toEqual({ line, column })
  expect(error.reason).toMatch(reason)
  expect(error.message).toBe(`Line ${line}, column ${column}: ${error.reason}`)
}

describe('an encoding is refused:', () => {
  const utf16 = (text: string, isLittle: boolean) =>
    [...text].flatMap((sign) => {
      const code = sign.charCodeAt(0)
      return isLittle ? [code & 255, code >> 8] : [code >> 8, code & 255]
    })
  const good = csvOfBreath(aBreath)
  const cases: [string, Uint8Array, number, number, RegExp][] = [
    ['UTF-16 with its mark', bytesOf([0xff, 0xfe], utf16(good, true)), 1, 1, /UTF-16/],
    ['UTF-16 big-endian with its mark', bytesOf([0xfe, 0xff], utf16(good, false)), 1, 1, /UTF-16/],
    ['UTF-16 without a mark', bytesOf(utf16(good, true)), 1, 1, /UTF-16/],
    ['UTF-16 big-endian without a mark', bytesOf(utf16(good, false)), 1, 1, /UTF-16/],
    ['Latin-1 in a comment', bytesOf('# firmware: ', [0xe9], '\n', good), 1, 1, /UTF-8/],
    ['Latin-1 in the header', bytesOf('time_s,co2_percent,', [0xb0], '_ppb\n1'), 1, 1, /UTF-8/],
    ['Latin-1 among numbers', bytesOf(header, '\n0,0.04,', [0xa0], '0,20\n'), 2, 3, /UTF-8/],
    ['a cut character', bytesOf('# firmware: ', [0xe2, 0x82], '\n', good), 1, 1, /UTF-8/],
    [
      'a second byte order mark',
      bytesOf([0xef, 0xbb, 0xbf, 0xef, 0xbb, 0xbf], good),
      1,
      1,
      /known/,
    ],
  ]
  test.each(cases)('%s', async (_what, bytes, line, column, reason) => {
    const error = await traceErrorOf(bytesInChunks(bytes, []))
    expect(error).toMatchObject({ line, column })
    expect(error.reason).toMatch(reason)
  })
})

test('a refusal never quotes the file, whatever stood there', async () => {
  const secret = 'Erika Mustermann'
  const files = [
    `# ${secret}\n`,
    `# ${secret}: 3\n`,
    `# ${secret}_lod_ppb: 3\n`,
    `# erika_mustermann_lod_ppb: 3\n${csvOfBreath(aBreath)}`,
    `# started_at: ${secret}\n`,
    `# isoprene_lod_ppb: ${secret}\n`,
    `time_s,co2_percent,${secret}\n`,
    withCell(9, 3, secret),
    withCell(9, 3, `0 ${secret}`),
    `${secret}\n`,
  ]
  for (const file of files) {
    const { message } = await traceErrorOf(file)
    expect(message.toLowerCase()).not.toMatch(/erika|mustermann/)
  }
})

test('a delay beyond 5 s in the settings is refused at the column of the gas', async () => {
  const settings = { analytes: { isoprene: { transportDelayS: -5.01 } } }
  const { line, column, reason } = await traceErrorOf(csvOfBreath(aBreath), settings)
  expect({ line, column }).toEqual({ line: 1, column: 4 })
  expect(reason).toMatch(/beyond 5 s/)
})

test('more samples than the settings allow are refused at the first of them', async () => {
  const { line, reason } = await traceErrorOf(csvOfBreath(aBreath), { mostSamples: 50 })
  expect(line).toBe(52)
  expect(reason).toMatch(/more than 50/)
})

test.each([
  { gapS: Number.NaN },
  { windowS: 0 },
  { restS: -1 },
  { coverage: Number.POSITIVE_INFINITY },
])('a setting that is no sound number is a mistake of the protocol: %o', async (settings) => {
  await expect(readTrace(csvOfBreath(aBreath), settings)).rejects.toThrow(RangeError)
})
