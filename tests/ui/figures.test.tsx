import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, test } from 'vitest'
import { fontCoverage } from '#server/reports/fontCoverage.ts'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import { figureThemes } from '#shared/figures/figureTheme.ts'
import { OutcomeStrip } from '#shared/figures/OutcomeStrip.tsx'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import { ScatterIdentity } from '#shared/figures/ScatterIdentity.tsx'

/** A made-up staircase with tied steps. */
const points = [
  { falsePositiveFraction: 0, sensitivity: 0, threshold: null },
  { falsePositiveFraction: 0, sensitivity: 0.5, threshold: 1400 },
  { falsePositiveFraction: 0.25, sensitivity: 0.75, threshold: 1180 },
  { falsePositiveFraction: 1, sensitivity: 1, threshold: 300 },
]
const ammonia = {
  label: 'Ammonia',
  unit: 'ppb',
  points,
  area: { estimate: 0.8421, lower: 0.7812, upper: 0.8894 },
}
const cutOff = {
  falsePositiveFraction: 0.25,
  sensitivity: 0.75,
  value: 1180,
  unit: 'ppb',
  label: 'planned cut-off',
}
const pairs = Array.from({ length: 40 }, (_, at) => ({
  reference: 300 + 40 * at,
  sensor: 310 + 40 * at + ((at * 37) % 60) - 30,
}))
const agreement = {
  unit: 'ppb',
  pairs: pairs.map(({ reference, sensor }) => ({
    mean: (sensor + reference) / 2,
    difference: sensor - reference,
  })),
  bias: { intercept: 9.5, interval: { lower: 4, upper: 15 } },
  lowerLimit: { intercept: -24.2, interval: { lower: -33, upper: -15 } },
  upperLimit: { intercept: 43.2, interval: { lower: 34, upper: 52 } },
  acceptance: { lower: -60, upper: 60 },
}
const values = {
  label: 'Ammonia, end-tidal',
  unit: 'ppb',
  present: [900, 1180, 1500, 2400],
  absent: [200, 410, 900],
  cutOff: { value: 1180, label: 'planned cut-off' },
}

const figures: Record<string, ReactElement> = {
  'ROC curve': <RocCurve id="one" curves={[ammonia]} cutOff={cutOff} />,
  'ROC curves of four biomarkers': (
    <RocCurve
      id="four"
      curves={['Ammonia', 'Nitric oxide', 'Acetone', 'Isoprene'].map((label) => ({
        ...ammonia,
        label,
        band: points.map((p) => ({ ...p, lower: p.sensitivity * 0.8, upper: p.sensitivity })),
      }))}
      cutOff={cutOff}
    />
  ),
  'strip of values': <OutcomeStrip id="strip" {...values} />,
  'narrow strip of values': <OutcomeStrip id="narrow" width={320} {...values} />,
  'difference plot': <DifferencePlot id="difference" {...agreement} />,
  'narrow difference plot': <DifferencePlot id="folded" width={320} {...agreement} />,
  'scatter with identity': (
    <ScatterIdentity
      id="scatter"
      pairs={pairs}
      unit="ppb"
      fit={{ label: 'Deming regression', intercept: -4.1, slope: 1.02 }}
    />
  ),
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

  test('is drawn with presentation attributes alone, so that the printed page shows the same', () => {
    expect(markup).not.toMatch(/ (class|style|filter|mask)=/)
    expect(markup).not.toMatch(/<(style|foreignObject|image|script)/)
  })

  test('writes only signs that Noto Sans has', () => {
    const words = [...markup.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text)
    expect(words.length).toBeGreaterThan(5)
    expect([...words.join('')].filter((sign) => !notoSans(sign.codePointAt(0)!))).toEqual([])
  })

  test('has no broken number in it and is the same each time', () => {
    expect(markup).not.toMatch(/NaN|undefined|null|Infinity/)
    expect(renderToStaticMarkup(figure)).toBe(markup)
  })
})

test('the description of a ROC curve says area, interval and what the cut-off gives', () => {
  const markup = renderToStaticMarkup(figures['ROC curve']!)
  expect(markup).toContain(
    'Ammonia: area 0.842 (95 % interval 0.781 to 0.889). At 1,180 ppb (planned cut-off) sensitivity is 0.750 and specificity 0.750.',
  )
})

test('four biomarkers differ in dash and mark, not in colour alone', () => {
  const markup = renderToStaticMarkup(figures['ROC curves of four biomarkers']!)
  const curves = [...markup.matchAll(/<path [^>]*stroke-width="2.2"[^>]*>/g)].map(String)
  const dashes = curves.map((curve) => /stroke-dasharray="([^"]*)"/.exec(curve)?.[1] ?? 'solid')
  expect(new Set(dashes).size).toBe(4)
})

test('copper is the cut-off and nothing else', () => {
  const { copper, copperText } = figureThemes.light
  const without = [
    <RocCurve key="roc" id="plain" curves={[ammonia, { ...ammonia, label: 'Acetone' }]} />,
    <OutcomeStrip key="strip" id="bare" {...values} cutOff={undefined} />,
    figures['difference plot']!,
    figures['scatter with identity']!,
  ].map((figure) => renderToStaticMarkup(figure))
  for (const markup of without) {
    expect(markup).not.toContain(copper)
    expect(markup).not.toContain(copperText)
  }
  expect(renderToStaticMarkup(figures['ROC curve']!)).toContain(copper)
})

test('present is a filled disc for each subject, absent an open diamond', () => {
  const markup = renderToStaticMarkup(figures['strip of values']!)
  const { present, absent, surface } = figureThemes.light
  const discs = new RegExp(`<path d="([^"]*)" fill="${present}" stroke="none"`).exec(markup)?.[1]
  const diamonds = new RegExp(`<path d="([^"]*)" fill="${surface}" stroke="${absent}"`).exec(
    markup,
  )?.[1]
  expect(discs?.match(/a/g)).toHaveLength(2 * values.present.length)
  expect(diamonds?.match(/M/g)).toHaveLength(values.absent.length)
  expect(markup).toContain('Present (4)')
  expect(markup).toContain('Absent (3)')
})

test('a strip of thousands says how many subjects a mark stands for', () => {
  const many = Array.from({ length: 9000 }, (_, at) => 400 + (at % 900))
  const markup = renderToStaticMarkup(
    <OutcomeStrip id="many" {...values} present={many} absent={many} />,
  )
  expect(markup).toMatch(/Each mark stands for \d+ subjects, a smaller one for fewer/)
})

test('a strip says that its axis is logarithmic, and is linear where a value is not above nought', () => {
  const log = renderToStaticMarkup(figures['strip of values']!)
  const linear = renderToStaticMarkup(<OutcomeStrip id="l" {...values} absent={[-5, 0, 900]} />)
  expect(log).toContain('Ammonia, end-tidal (ppb, log scale)')
  expect(linear).toContain('Ammonia, end-tidal (ppb)')
})

test('a strip without any value is drawn empty', () => {
  const markup = renderToStaticMarkup(
    <OutcomeStrip id="none" label="Ammonia" unit="ppb" present={[]} absent={[]} />,
  )
  expect(markup).toContain('Present (0)')
  expect(markup).not.toContain('NaN')
})

test('a ROC curve of 18,000 points is drawn small and soon', () => {
  const many = Array.from({ length: 18_000 }, (_, at) => {
    const share = at / 17_999
    return { falsePositiveFraction: share, sensitivity: share ** 0.3, threshold: -at }
  })
  const started = performance.now()
  const markup = renderToStaticMarkup(
    <RocCurve id="many" curves={[{ ...ammonia, points: many }]} cutOff={cutOff} />,
  )
  expect(markup.length).toBeLessThan(60_000)
  expect(performance.now() - started).toBeLessThan(1000)
})

test('a plot of 18,000 pairs says what its larger discs stand for', () => {
  const many = Array.from({ length: 18_000 }, (_, at) => ({
    mean: 500 + ((at * 7919) % 1000),
    difference: ((at * 104_729) % 200) - 100,
  }))
  const markup = renderToStaticMarkup(<DifferencePlot id="m" {...agreement} pairs={many} />)
  expect(markup).toMatch(/A larger disc stands for more pairs, the largest for \d+/)
  expect(markup.length).toBeLessThan(400_000)
})

test('bias, limits and acceptance limits are named with their numbers', () => {
  for (const name of ['difference plot', 'narrow difference plot']) {
    const markup = renderToStaticMarkup(figures[name]!)
    for (const words of ['9.5 (4.0 to 15.0)', '−24.2 (−33.0 to −15.0)', 'Acceptable up to']) {
      expect(markup).toContain(words)
    }
  }
})

/** Relative luminance contrast. Source: WCAG 2.2, definition of contrast ratio. */
function contrast(one: string, other: string): number {
  const luminance = (colour: string) => {
    const [r, g, b] = [1, 3, 5].map((at) => {
      const share = Number.parseInt(colour.slice(at, at + 2), 16) / 255
      return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
    })
    return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!
  }
  const [dark, bright] = [luminance(one), luminance(other)].sort((a, b) => a - b)
  return (bright! + 0.05) / (dark! + 0.05)
}

test.each(Object.entries(figureThemes))('in %s, words and lines stand out enough', (_, theme) => {
  for (const words of ['ink', 'inkQuiet', 'copper', 'copperText', 'present', 'absent'] as const) {
    expect(contrast(theme[words], theme.surface), words).toBeGreaterThanOrEqual(4.5)
  }
  for (const line of [...theme.series, theme.axis]) {
    expect(contrast(line, theme.surface), line).toBeGreaterThanOrEqual(3)
  }
  expect(contrast(theme.series[1], theme.surface)).toBeGreaterThanOrEqual(4.5)
})
