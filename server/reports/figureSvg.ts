import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import type { ReportDocument } from './reportDocument.ts'
import { textRuns } from './textRuns.ts'

/** The SVG of a figure, its words split where Noto Sans lacks a sign: SVG has no fallback of fonts. */
export function figureSvg(figure: ReactElement | string): string {
  const markup = typeof figure === 'string' ? figure : renderToStaticMarkup(figure)
  return markup.replace(
    /(<text\b[^>]*>)([^<]+)/g,
    (_, tag: string, words: string) => tag + spans(words),
  )
}

/** The document with every figure drawn, so that it can be posted to another thread. */
export function drawFigures(document: ReportDocument): ReportDocument {
  const sections = document.sections.map((section) => ({
    ...section,
    blocks: section.blocks.map((block) =>
      block.kind === 'figure' ? { ...block, figure: figureSvg(block.figure) } : block,
    ),
  }))
  return { ...document, sections }
}

function spans(words: string): string {
  return textRuns(words)
    .map(({ text, font }) =>
      font === 'Noto Sans' ? text : `<tspan font-family="${font}">${text}</tspan>`,
    )
    .join('')
}
