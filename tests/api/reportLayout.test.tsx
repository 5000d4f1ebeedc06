import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Worker } from 'node:worker_threads'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { drawFigures, figureSvg } from '#server/reports/figureSvg.ts'
import { renderPdf } from '#server/reports/renderPdf.ts'
import type { ReportBlock, ReportDocument } from '#server/reports/reportDocument.ts'
import { textRuns } from '#server/reports/textRuns.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'

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

const HASH = '9f3c71a0b2d84e55c6f7091a3b4c5d6e7f8091a2b3c4d5e6f70819a2b3c4d5e6'

function aReport(blocks: readonly ReportBlock[]): ReportDocument {
  return {
    title: 'Interim report 2',
    subtitle: 'Invented data',
    header: { study: 'LARK-2', part: 'Closed part', stamp: 'Unblinded: earlier data' },
    caution: {
      heading: 'For research use only',
      text: 'Not for diagnosis or treatment decisions.',
    },
    datasetHash: HASH,
    provenance: [
      { label: 'Counted', value: '201 of 214 subjects' },
      { label: 'Manifest', value: HASH },
    ],
    createdAt: '2026-10-14T11:52:00.000Z',
    sections: [
      { heading: 'Primary analysis', blocks },
      { heading: 'Signatures', blocks: [{ kind: 'paragraph', text: 'None yet.', quiet: true }] },
    ],
  }
}

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

let folder: string
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'report-'))
})
afterAll(() => rmSync(folder, { recursive: true, force: true }))

/** Each page's text as poppler's pdftotext reads it back, in the order in which it is laid out. */
async function pagesOf(document: ReportDocument): Promise<string[]> {
  return readPages(await renderPdf(document))
}

function readPages(pdf: Uint8Array): string[] {
  const path = join(folder, 'report.pdf')
  writeFileSync(path, pdf)
  const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' })
  return text.split('\f').slice(0, -1)
}

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
  const path = join(folder, 'metadata.pdf')
  writeFileSync(path, await renderPdf(sample))
  const info = execFileSync('pdfinfo', ['-isodates', path], { encoding: 'utf8' })
  expect(info).toMatch(/Title:\s+Interim report 2/)
  expect(info).toMatch(/CreationDate:\s+2026-10-14T11:52:00Z/)
  expect(info).toMatch(/Page size:.*A4/)
  const outline = execFileSync('pdftohtml', ['-xml', '-stdout', '-i', path], { encoding: 'utf8' })
  expect([...outline.matchAll(/<item page="\d+">([^<]*)</g)].map(([, name]) => name)).toEqual([
    'Primary analysis',
    'Signatures',
  ])
})

test('a headline never stands alone at the foot of a page', async () => {
  for (let lines = 22; lines <= 30; lines += 1) {
    const filler = Array.from({ length: lines }, (_, at) => ({
      kind: 'paragraph' as const,
      text: `Line ${at}`,
    }))
    const pages = await pagesOf(aReport(filler))
    const page = pages.find((text) => text.includes('Signatures'))
    expect(page).toContain('None yet.')
  }
})

test('a headline goes with the figure or table under it', async () => {
  const table: ReportBlock = { kind: 'table', columns: [{ label: 'Subject' }], rows: [['N04-1']] }
  const drawing: ReportBlock = { kind: 'figure', figure, caption: 'N04-1' }
  for (const next of [table, drawing]) {
    for (let lines = 18; lines <= 28; lines += 1) {
      const filler = Array.from({ length: lines }, (_, at) => ({
        kind: 'paragraph' as const,
        text: `Line ${at}`,
      }))
      const headline: ReportBlock = { kind: 'subheading', text: 'All subjects' }
      const pages = await pagesOf(aReport([...filler, headline, next]))
      expect(pages.find((text) => text.includes('All subjects'))).toContain('N04-1')
    }
  }
})

test('a word too long for its column is broken and nothing of it is lost', async () => {
  const long = 'abcdefghij'.repeat(30)
  const columns = [{ label: 'Subject' }, { label: 'Reason' }]
  const pages = await pagesOf(aReport([{ kind: 'table', columns, rows: [['N04-1', long]] }]))
  const letters = pages.join('').match(/\b[a-j]{20,}\b/g)
  expect(letters?.join('')).toContain(long.slice(0, 20))
  expect(letters?.join('').length).toBe(long.length)
})

/** Numbered words, so that every lost one is noticed. */
function numbered(count: number): string[] {
  return Array.from({ length: count }, (_, at) => `word${at}`)
}

const blank = '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 300 300"></svg>'
const longBlocks: Record<string, (text: string) => ReportBlock> = {
  paragraph: (text) => ({ kind: 'paragraph', text }),
  caution: (text) => ({ kind: 'caution', heading: 'Exploratory', text }),
  value: (text) => ({ kind: 'keyValues', pairs: [{ label: 'Reason', value: text }] }),
  cell: (text) => ({
    kind: 'table',
    columns: [{ label: 'Subject' }, { label: 'Reason' }],
    rows: [['N04-1', text]],
  }),
  caption: (text) => ({ kind: 'figure', figure: blank, caption: text }),
}

test.each(Object.entries(longBlocks))(
  'a %s of any length is printed to its last word',
  async (_, block) => {
    for (const count of [60, 400, 700, 1000, 2500]) {
      const text = (await pagesOf(aReport([block(numbered(count).join(' '))]))).join('\n')
      expect(new Set(text.match(/\bword\d+\b/g))).toEqual(new Set(numbered(count)))
      expect(text).toContain('None yet.')
    }
  },
)

test('provenance that the margin has no room for goes into the text', async () => {
  const provenance = numbered(80).map((value) => ({ label: `About ${value}`, value }))
  const text = (await pagesOf({ ...aReport([]), provenance })).join('\n')
  expect(new Set(text.match(/\bword\d+\b/g))).toEqual(new Set(numbered(80)))
})

test('a caution that would not fit on every page is refused', async () => {
  const caution = { heading: 'Caution', text: numbered(900).join(' ') }
  await expect(renderPdf({ ...aReport([]), caution })).rejects.toThrow(RangeError)
})

test('a long title keeps to one line of the header', async () => {
  const title = numbered(40).join(' ')
  const [first, second] = await pagesOf({ ...sample, title })
  expect(new Set(first!.match(/\bword\d+\b/g))).toEqual(new Set(numbered(40)))
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
