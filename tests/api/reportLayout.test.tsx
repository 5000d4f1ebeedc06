import { Worker } from 'node:worker_threads'
import { beforeAll, describe, expect, test } from 'vitest'
import { drawFigures, figureSvg } from '#server/reports/figureSvg.ts'
import { renderPdf } from '#server/reports/renderPdf.ts'
import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { textRuns } from '#server/reports/textRuns.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import { aReport, bookmarksOf, fileInfoOf, HASH, pagesOf } from '../support/reports.ts'

/** Made-up numbers: only the look of the page is under test. */
const curve = {
  unit: 'ppb',
  points: [
    { falsePositiveFraction: 0, sensitivity: 0, threshold: null },
    { falsePositiveFraction: 0.2, sensitivity: 0.8, threshold: 1180 },
    { falsePositiveFraction: 1, sensitivity: 1, threshold: 90 },
  ],
}
const figure = (
  <RocCurve
    id="roc"
    curves={[
      { ...curve, label: 'Ammonia → end-tidal' },
      { ...curve, label: 'Acetone & isoprene' },
    ]}
  />
)

const SIGNS = '≥ ≤ ≠ ≈ ∞ √ → ✓ − µ ₂'
const rows = Array.from({ length: 90 }, (_, at) => [`N04-${1000 + at}-W`, `${300 + at}`, '≥ 0.90'])
const sample = aReport([
  { kind: 'paragraph', text: `Signs: ${SIGNS}` },
  { kind: 'keyValues', pairs: [{ label: 'Method', value: 'DeLong, 95 %' }] },
  { kind: 'figure', figure, caption: 'Sensitivity against 1 − specificity', share: 0.7 },
  { kind: 'caution', heading: 'Exploratory', text: 'Not planned before linked data were read.' },
  { kind: 'subheading', text: 'All subjects' },
  {
    kind: 'table',
    caption: 'Readings',
    columns: [
      { label: 'Subject' },
      { label: 'Ammonia (ppb)', align: 'right' },
      { label: 'Specificity' },
    ],
    rows,
  },
])

describe('every page', () => {
  let pages: string[]
  beforeAll(async () => {
    pages = await pagesOf(sample)
  })

  test('carries the caution, the whole hash and its number', () => {
    expect(pages.length).toBeGreaterThan(2)
    for (const [at, page] of pages.entries()) {
      expect(page).toContain('For research use only')
      expect(page.replace(/\s+/g, ' ')).toMatch(/Not for diagnosis or.*treatment decisions\./)
      expect(page).toContain(`Dataset SHA-256 ${HASH}`)
      expect(page).toContain(`page ${at + 1} of ${pages.length}`)
    }
  })

  test('names study and part and is stamped when its data were never blinded', () => {
    for (const page of pages) {
      expect(page).toMatch(/LARK-2.*Closed part\s+Unblinded: earlier data/)
    }
  })

  test('repeats the head of a table that runs on', () => {
    const withRows = pages.filter((page) => /N04-10\d\d-W/.test(page))
    expect(withRows.length).toBeGreaterThan(1)
    for (const page of withRows) expect(page).toContain('Ammonia (ppb)')
  })

  test('holds every row once, whole', () => {
    const text = pages.join('\n')
    for (const [subject, value] of rows) {
      expect(text.match(new RegExp(`${subject}\\s+${value}\\s+≥ 0\\.90`, 'g'))).toHaveLength(1)
    }
  })

  test('writes signs that Noto Sans lacks, in text and in figures', () => {
    expect(pages.join('\n')).toContain(`Signs: ${SIGNS}`)
    expect(pages.join('\n')).toContain('Ammonia → end-tidal')
    expect(pages.join('\n')).toContain('Acetone & isoprene')
  })

  test('puts provenance on the first page', () => {
    expect(pages[0]).toContain('201 of 214 subjects')
    expect(pages[1]).not.toContain('201 of 214 subjects')
  })
})

test('the same report gives the same bytes', async () => {
  const [first, second] = [await renderPdf(sample), await renderPdf(sample)]
  expect(first.equals(second)).toBe(true)
  const later = await renderPdf({ ...sample, createdAt: '2026-10-14T11:53:00.000Z' })
  expect(later.equals(first)).toBe(false)
})

test('the file carries its title, its date and a bookmark for each section', async () => {
  const info = await fileInfoOf(sample)
  expect(info).toMatch(/Title:\s+Interim report 2/)
  expect(info).toMatch(/CreationDate:\s+2026-10-14T11:52:00Z/)
  expect(info).toMatch(/Page size:.*A4/)
  expect(await bookmarksOf(sample)).toEqual(['Primary analysis', 'Signatures'])
})

test('a long title keeps to one line of the header', async () => {
  const numbered = Array.from({ length: 40 }, (_, at) => `word${at}`)
  const title = numbered.join(' ')
  const [first, second] = await pagesOf({ ...sample, title })
  expect(new Set(first!.match(/\bword\d+\b/g))).toEqual(new Set(numbered))
  expect(second).toMatch(/LARK-2\s+word0 .*…\s+Closed part/)
})

test('a sign that no font has is replaced where it can be seen', () => {
  expect(textRuns('a呼b').map(({ text }) => text)).toEqual(['a\uFFFDb'])
  expect(textRuns('tab\tbell\u0007').map(({ text }) => text)).toEqual(['tab bell '])
})

test('a row with a missing cell is refused', async () => {
  const columns = [{ label: 'Subject' }, { label: 'Reason' }]
  const table: ReportBlock = { kind: 'table', columns, rows: [['N04-1']] }
  await expect(renderPdf(aReport([table]))).rejects.toThrow(RangeError)
})

test('a report without an instant is refused', async () => {
  await expect(renderPdf({ ...sample, createdAt: 'today' })).rejects.toThrow(RangeError)
})

test('a figure is drawn for the page as for the screen, with its missing signs set apart', () => {
  const svg = figureSvg(figure)
  expect(svg).toMatch(/Ammonia <tspan font-family="DejaVu Sans">→ <\/tspan>end-tidal/)
  expect(figureSvg(svg)).toBe(svg)
})

test('a report whose figures are drawn renders the same in a worker thread', async () => {
  const worker = new Worker(
    `
      const { parentPort, workerData } = require('node:worker_threads')
      import('tsx/esm/api')
        .then(({ register }) => register())
        .then(() => import(workerData.module))
        .then(({ renderPdf }) => renderPdf(workerData.report))
        .then((pdf) => parentPort.postMessage(new Uint8Array(pdf)))
    `,
    {
      eval: true,
      workerData: {
        module: new URL('../../server/reports/renderPdf.ts', import.meta.url).href,
        report: drawFigures(sample),
      },
    },
  )
  const pdf = await new Promise<Uint8Array>((resolve, reject) => {
    worker.once('message', resolve)
    worker.once('error', reject)
  })
  await worker.terminate()
  expect(Buffer.from(pdf).equals(await renderPdf(sample))).toBe(true)
})
