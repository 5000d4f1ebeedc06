import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, test } from 'vitest'
import { fontCoverage } from '#server/reports/fontCoverage.ts'
import { AllanPlot } from '#shared/figures/AllanPlot.tsx'
import { allanTable } from '#shared/figures/allanTable.ts'
import { CalibrationLine } from '#shared/figures/CalibrationLine.tsx'
import { calibrationTable } from '#shared/figures/calibrationTable.ts'
import { columnHeading, type FigureTable, formatCell } from '#shared/figures/figureTable.ts'
import { figureThemes } from '#shared/figures/figureTheme.ts'
import { PlanCurve } from '#shared/figures/PlanCurve.tsx'
import { planCurveTable } from '#shared/figures/planCurveTable.ts'
import type { PlanCurveData } from '#shared/figures/planCurveTypes.ts'
import { ResidualPlot } from '#shared/figures/ResidualPlot.tsx'

const curve: PlanCurveData = {
  title: 'Subjects against the expected area',
  x: { label: 'Expected area', kind: 'linear', format: 'proportion' },
  y: { label: 'Subjects with the condition', kind: 'log', format: 'count' },
  lines: [
    {
      label: 'Power 0.9',
      points: [
        { x: 0.7, y: null },
        { x: 0.75, y: 500 },
        { x: 0.8, y: 127 },
        { x: 0.85, y: null },
        { x: 0.9, y: 40 },
        { x: 0.95, y: 20 },
      ],
    },
    {
      label: 'Power 0.8',
      points: [
        { x: 0.75, y: 370 },
        { x: 0.95, y: 15 },
      ],
    },
  ],
  mark: { x: 0.8, y: 127, label: '127' },
}
const readings = [50, 100, 500, 2000].flatMap((level) =>
  [-0.1, 0.15].map((off) => ({ level, signal: 0.8 + 0.0126 * level + off })),
)
const line = { intercept: 0.8, slope: 0.0126 }
const level = { label: 'Level', unit: 'ppb' }
const signal = { label: 'Signal', unit: 'nA' }
const residuals = readings.map(({ level: at }, place) => ({ level: at, percent: place - 3 }))
const points = [1, 2, 4, 8, 16].map((m, at) => ({
  m,
  tauS: m / 2,
  deviation: [2, 1.4, 1, 0.9, 1.3][at]!,
  terms: 100 - m,
}))
const minimum = points[3]!

const figures: Record<string, ReactElement> = {
  'curve of a plan': <PlanCurve id="plan" curve={curve} />,
  'narrow curve of a plan': <PlanCurve id="narrow" curve={curve} width={300} />,
  'calibration line': <CalibrationLine id="line" {...{ readings, line, level, signal }} />,
  'calibration line with a level found': (
    <CalibrationLine
      id="found"
      {...{ readings, line, level, signal }}
      found={{ signal: 4.6, level: 301, interval: { lower: 257, upper: 343 } }}
    />
  ),
  residuals: <ResidualPlot id="residuals" {...{ residuals, level }} limitPercent={5} />,
  'Allan deviation': <AllanPlot id="allan" {...{ points, minimum }} unit="ppb" />,
}

const require = createRequire(import.meta.url)
const notoSans = fontCoverage(
  readFileSync(require.resolve('@expo-google-fonts/noto-sans/400Regular/NotoSans_400Regular.ttf')),
)

describe.each(Object.entries(figures))('%s', (_, figure) => {
  const markup = renderToStaticMarkup(figure)

  test('has a fixed view box, a role, a name and a description', () => {
    const id = /aria-labelledby="(\S+)-title \S+-description"/.exec(markup)?.[1]
    expect(markup).toMatch(/^<svg [^>]*viewBox="0 0 \d+ \d+" role="img"/)
    expect(markup).toMatch(new RegExp(`<title id="${id}-title">[^<]{5,}</title>`))
    expect(markup).toMatch(new RegExp(`<desc id="${id}-description">[^<]{20,}</desc>`))
  })

  test('is drawn with presentation attributes alone, in signs that Noto Sans has', () => {
    expect(markup).not.toMatch(/ (class|style|filter|mask)=/)
    const words = [...markup.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text)
    expect(words.length).toBeGreaterThan(5)
    expect([...words.join('')].filter((sign) => !notoSans(sign.codePointAt(0)!))).toEqual([])
  })

  test('has no broken number in it, and no copper: nothing in it is a cut-off', () => {
    expect(markup).not.toMatch(/NaN|undefined|null|Infinity/)
    expect(markup).not.toContain(figureThemes.light.copper)
  })
})

test('a curve is broken where there is no answer', () => {
  const markup = renderToStaticMarkup(figures['curve of a plan']!)
  const drawn = /<path d="([^"]*)"[^>]*stroke-width="2.2"/.exec(markup)![1]!
  expect(drawn.match(/M/g)).toHaveLength(2)
  expect(drawn.match(/L/g)).toHaveLength(2)
})

test('descriptions say in words what the figures show', () => {
  const words = (name: string) => renderToStaticMarkup(figures[name]!)
  expect(words('curve of a plan')).toContain(
    'Power 0.9: from 500 at 0.75 to 20 at 0.95. Power 0.8: from 370 at 0.75 to 15 at 0.95. The plan: 127 at 0.8.',
  )
  expect(words('calibration line with a level found')).toContain(
    '8 readings of standards, and the line signal = 0.8 + 0.0126 × level. A signal of 4.6 points to 301.',
  )
  expect(words('residuals')).toContain('8 readings; 0 of them further than 5 %')
  expect(words('Allan deviation')).toContain('Smallest at 4 s: 0.9 ppb.')
})

test('the minimum of an Allan deviation and the level of a signal are named at their mark', () => {
  expect(renderToStaticMarkup(figures['Allan deviation']!)).toMatch(/font-weight="600"[^>]*>4 s</)
  expect(renderToStaticMarkup(figures['calibration line with a level found']!)).toMatch(
    /font-weight="600"[^>]*>301</,
  )
})

test('a deviation of 0 is left out of the logarithmic figure', () => {
  const markup = renderToStaticMarkup(
    <AllanPlot
      id="zero"
      points={[...points, { ...points[0]!, tauS: 16, deviation: 0 }]}
      minimum={{ tauS: 16, deviation: 0 }}
    />,
  )
  expect(markup).not.toMatch(/NaN|Infinity/)
  expect(markup).toContain('log scale')
})

/** A table as its reader sees it. */
const read = (table: FigureTable): string[][] => [
  table.columns.map(columnHeading),
  ...table.rows.map((row) => table.columns.map((column) => formatCell(column, row[column.key]!))),
]

test('the tables behind the figures hold their numbers', () => {
  expect(read(planCurveTable(curve)).slice(0, 4)).toEqual([
    ['Expected area', 'Power 0.9', 'Power 0.8'],
    ['0.700', 'not estimable', 'not estimable'],
    ['0.750', '500', '370'],
    ['0.800', '127', 'not estimable'],
  ])
  expect(read(allanTable({ points: points.slice(0, 1), unit: 'ppb' }))).toEqual([
    ['Averaging time (s)', 'Readings averaged', 'Allan deviation (ppb)', 'Differences'],
    ['0.5', '1', '2', '99'],
  ])
  const row = { level: 50, signal: 1.43, found: 50.4, percent: 0.8 }
  expect(read(calibrationTable({ readings: [row], level, signal }))).toEqual([
    ['Level (ppb)', 'Signal (nA)', 'Back-calculated (ppb)', 'Residual (%)'],
    ['50', '1.43', '50.4', '0.8'],
  ])
})
