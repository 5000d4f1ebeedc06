import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { renderToStaticMarkup } from 'react-dom/server'
import { expect, test } from 'vitest'
import { fontCoverage } from '#server/reports/fontCoverage.ts'
import { ExhalationTrace, type ExhalationTraceProps } from '#shared/figures/ExhalationTrace.tsx'
import { exhalationTraceTable } from '#shared/figures/exhalationTraceTable.ts'
import { columnHeading, formatCell } from '#shared/figures/figureTable.ts'
import { figureThemes } from '#shared/figures/figureTheme.ts'

const gas = { label: 'Isoprene', unit: 'ppb' }
const samplesAt = (perSecond: number) =>
  Array.from({ length: 12 * perSecond + 1 }, (_, i) => {
    const s = i / perSecond - 1
    const out = s >= 0 && s < 10
    return {
      timeS: i / perSecond,
      co2Percent: out ? 0.04 + 4.8 * (1 - Math.exp(-s / 0.5)) : 0.04,
      gas: out ? 20 + 480 * (1 - Math.exp(-s / 1.5)) : 20,
    }
  })
const base: ExhalationTraceProps = {
  id: 'first',
  number: 1,
  samples: samplesAt(10),
  gas,
  plateau: { startS: 8, endS: 11 },
  accepted: true,
  gapS: 0.3,
}
const draw = (more: Partial<ExhalationTraceProps> = {}) =>
  renderToStaticMarkup(<ExhalationTrace {...base} {...more} />)
const gasPath = (markup: string) => /<path d="([^"]*)"[^>]*stroke-width="2.4"/.exec(markup)![1]!

const require = createRequire(import.meta.url)
const notoSans = fontCoverage(
  readFileSync(require.resolve('@expo-google-fonts/noto-sans/400Regular/NotoSans_400Regular.ttf')),
)

test('an exhalation has a fixed view box, a role, a name and a description in words', () => {
  const markup = draw()
  expect(markup).toMatch(/^<svg [^>]*viewBox="0 0 \d+ \d+" role="img"/)
  expect(markup).toContain('<title id="first-title">Exhalation 1: Isoprene and CO2</title>')
  expect(markup).toContain(
    'From 0 to 12 s. CO2 rises to 4.84 %. Isoprene rises to 499.3 ppb. The plateau from 8 to 11 s is outlined.',
  )
})

test.each([
  ['accepted', draw()],
  ['left out', draw({ accepted: false })],
  ['narrow', draw({ width: 260 })],
  ['without a plateau', draw({ plateau: null })],
  ['empty', draw({ samples: [] })],
  ['at night', draw({ theme: figureThemes.night })],
])(
  'an exhalation %s has sound numbers, presentation attributes alone and no copper',
  (_, markup) => {
    expect(markup).not.toMatch(/NaN|undefined|null|Infinity/)
    expect(markup).not.toMatch(/ (class|style|filter|mask)=/)
    expect(markup).not.toContain(figureThemes.light.copper)
    expect(markup).not.toContain(figureThemes.night.copper)
    const words = [...markup.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text)
    expect(words.length).toBeGreaterThan(3)
    expect([...words.join('')].filter((sign) => !notoSans(sign.codePointAt(0)!))).toEqual([])
  },
)

test('the gas is solid, CO2 dashed and thinner, each named with the top of its scale', () => {
  const markup = draw()
  expect(markup).toMatch(/stroke-width="1.4" stroke-dasharray="5 4"/)
  expect(markup).not.toMatch(/stroke-width="2.4"[^>]*stroke-dasharray/)
  expect(markup).toContain('>Isoprene, to 500 ppb<')
  expect(markup).toContain('>CO2 (dashed), to 5 %<')
})

test('the plateau is filled where it is accepted, dashed and empty where it is left out', () => {
  expect(draw()).toMatch(/<rect [^>]*fill="#e0eeeb"/)
  expect(draw({ accepted: false })).toMatch(/<rect [^>]*fill="none"[^>]*stroke-dasharray/)
  expect(draw({ plateau: null })).not.toContain('<rect')
})

test('a curve breaks at a gap in time and where the gas has no value', () => {
  const moves = (samples: ExhalationTraceProps['samples']) =>
    gasPath(draw({ samples })).match(/M/g)!.length
  expect(moves(base.samples)).toBe(1)
  expect(moves(base.samples.filter(({ timeS }) => timeS < 5 || timeS > 5.5))).toBe(2)
  expect(
    moves(base.samples.map((each) => (each.timeS === 5 ? { ...each, gas: null } : each))),
  ).toBe(2)
})

test('a curve of 120,000 samples is thinned, and its table holds them all', () => {
  const samples = samplesAt(10_000)
  expect(gasPath(draw({ samples })).match(/L/g)!.length).toBeLessThan(2_000)
  expect(exhalationTraceTable({ number: 1, samples, gas }).rows).toHaveLength(120_001)
})

test('the table has time, CO2 and gas with their units', () => {
  const { columns, rows } = exhalationTraceTable({
    number: 1,
    samples: [{ timeS: 1.5, co2Percent: 4.2, gas: null }],
    gas,
  })
  expect(columns.map(columnHeading)).toEqual(['Time (s)', 'CO2 (%)', 'Isoprene (ppb)'])
  expect(columns.map((column) => formatCell(column, rows[0]![column.key]!))).toEqual([
    '1.5',
    '4.2',
    'not estimable',
  ])
})
