import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/** The text of each page of a PDF, as poppler's pdftotext reads it back in its layout. */
export function pdfPages(pdf: Uint8Array): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'pdf-'))
  try {
    const path = join(folder, 'file.pdf')
    writeFileSync(path, pdf)
    const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' })
    return text.split('\f').slice(0, -1)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/** All pages in one line, so that a sentence is found wherever it was broken. */
export const inOneLine = (pages: readonly string[]): string => pages.join(' ').replace(/\s+/g, ' ')
