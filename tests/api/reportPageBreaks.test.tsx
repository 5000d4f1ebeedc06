import { expect, test } from 'vitest'
import { renderPdf } from '#server/reports/renderPdf.ts'
import type { ReportBlock } from '#server/reports/reportDocument.ts'
import { aReport, pagesOf } from '../support/reports.ts'

const blank = '<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 300 300"></svg>'

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
  const drawing: ReportBlock = { kind: 'figure', figure: blank, caption: 'N04-1' }
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
