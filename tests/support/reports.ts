import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { renderPdf } from '#server/reports/renderPdf.ts'
import type { ReportBlock, ReportDocument } from '#server/reports/reportDocument.ts'

export const HASH = '9f3c71a0b2d84e55c6f7091a3b4c5d6e7f8091a2b3c4d5e6f70819a2b3c4d5e6'

/** An invented report with these blocks in its first section. */
export function aReport(blocks: readonly ReportBlock[]): ReportDocument {
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

/** Each page's text as poppler's pdftotext reads it back, as it is laid out. */
export async function pagesOf(document: ReportDocument): Promise<string[]> {
  const text = withPdf(await renderPdf(document), (path) =>
    poppler('pdftotext', '-layout', path, '-'),
  )
  return text.split('\f').slice(0, -1)
}

/** What poppler says about the file: title, dates, size of the page. */
export async function fileInfoOf(document: ReportDocument): Promise<string> {
  return withPdf(await renderPdf(document), (path) => poppler('pdfinfo', '-isodates', path))
}

/** The names of the bookmarks, in order. */
export async function bookmarksOf(document: ReportDocument): Promise<string[]> {
  const pdf = await renderPdf(document)
  const xml = withPdf(pdf, (path) => poppler('pdftohtml', '-xml', '-stdout', '-i', path))
  return [...xml.matchAll(/<item page="\d+">([^<]*)</g)].map(([, name]) => name!)
}

function poppler(command: string, ...parameters: string[]): string {
  return execFileSync(command, parameters, { encoding: 'utf8' })
}

function withPdf(pdf: Uint8Array, read: (path: string) => string): string {
  const folder = mkdtempSync(join(tmpdir(), 'report-'))
  try {
    const path = join(folder, 'report.pdf')
    writeFileSync(path, pdf)
    return read(path)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}
