import pdfmake from 'pdfmake'
import type { Content, Node, TDocumentDefinitions } from 'pdfmake/interfaces'
import { blockContent, isKeptWhole } from './reportBlocks.ts'
import type { ReportDocument, ReportSection } from './reportDocument.ts'
import { REPORT_FONTS } from './reportFonts.ts'
import { pageBackground, pageFooter, pageHeader, provenancePlaces } from './reportPage.ts'
import { BODY, COLOUR, PAGE, SIZE } from './reportStyle.ts'
import { styledText } from './reportText.ts'

const FONT_FILES = new Set(Object.values(REPORT_FONTS).flatMap((family) => Object.values(family)))

pdfmake.setFonts(REPORT_FONTS)
pdfmake.setUrlAccessPolicy(() => false)
pdfmake.setLocalAccessPolicy((path) => FONT_FILES.has(path))

/**
 * The report as a PDF file of A4 pages. The same document gives the same bytes: the file's dates are
 * the document's own and its identifier is made from them. Reads fonts and nothing else, keeps no
 * state, and so runs in a worker thread as well.
 * @throws RangeError when `createdAt` is no instant or a table's row has not one cell per column
 */
export async function renderPdf(document: ReportDocument): Promise<Buffer> {
  return pdfmake.createPdf(definition(document)).getBuffer()
}

function definition(document: ReportDocument): TDocumentDefinitions {
  const createdAt = new Date(document.createdAt)
  if (Number.isNaN(createdAt.getTime())) throw new RangeError('createdAt is not an instant')
  return {
    pageSize: 'A4',
    pageMargins: [BODY.left, BODY.top, BODY.right, BODY.bottom],
    version: '1.7',
    language: 'en-GB',
    displayTitle: true,
    info: {
      title: document.title,
      subject: `${document.header.study}, dataset ${document.datasetHash}`,
      creator: 'Breathmark',
      creationDate: createdAt,
      modDate: createdAt,
    },
    defaultStyle: {
      font: 'Noto Sans',
      fontSize: SIZE.text,
      lineHeight: 1.15,
      color: COLOUR.ink,
    },
    background: (page) => pageBackground(document, page),
    header: (page) => pageHeader(document, page),
    footer: (page, pages) => pageFooter(document, page, pages),
    content: [
      titleContent(document),
      ...provenanceContent(document),
      ...document.sections.map(sectionContent),
    ],
    pageBreakBefore: isStrandedHeadline,
  }
}

function titleContent({ title, subtitle }: ReportDocument): Content {
  return {
    stack: [
      styledText(title, { fontSize: SIZE.title, bold: true, lineHeight: 1.05 }),
      ...(subtitle ? [styledText(subtitle, { fontSize: 10.5, color: COLOUR.inkQuiet })] : []),
    ],
    margin: [0, 4, 0, 16],
  }
}

/** Provenance that the margin has no room for. */
function provenanceContent(document: ReportDocument): Content[] {
  const pairs = provenancePlaces(document).text
  return pairs.length === 0 ? [] : [blockContent({ kind: 'keyValues', pairs })]
}

/** A section; headlines hold on to the figure or caution under them. */
function sectionContent({ heading, newPage = false, blocks }: ReportSection): Content {
  const content: Content[] = []
  let held: Content[] = [sectionHeadline(heading)]
  for (const block of blocks) {
    if (block.kind === 'subheading') {
      held.push(blockContent(block))
      continue
    }
    content.push(
      isKeptWhole(block)
        ? keptTogether([...held, blockContent(block)])
        : [...held, blockContent(block)],
    )
    held = []
  }
  const [first, ...rest] = [...content, ...held]
  // Asked of the first thing itself: an empty one in between could end up alone on a page.
  return [newPage ? ({ stack: [first], pageBreak: 'before' } as Content) : first!, ...rest]
}

function sectionHeadline(heading: string): Content {
  return styledText(heading, {
    fontSize: SIZE.heading,
    bold: true,
    headlineLevel: 1,
    outline: true,
    outlineText: heading,
    margin: [0, 8, 0, 6],
  })
}

/**
 * Contents on one page. None of them may ask for a page break of its own: pdfmake keeps the first
 * page of such a block and drops the rest.
 */
function keptTogether(contents: readonly Content[]): Content {
  const stack = contents.map((content) =>
    typeof content === 'object' && !Array.isArray(content)
      ? ({ ...content, headlineLevel: undefined } as Content)
      : content,
  )
  return { stack, unbreakable: true }
}

/**
 * Room that a headline needs below it, in points: for the headlines that may follow, the head of a
 * table and its first row, or the first lines of a paragraph.
 */
const ROOM_BELOW: Record<number, number> = { 1: 120, 2: 80 }

/** Whether a headline would stand alone at the foot of a page; it then goes over to the next. */
function isStrandedHeadline({ headlineLevel = 0, startPosition }: Node): boolean {
  const room = PAGE.height - BODY.bottom - startPosition.top
  return room < (ROOM_BELOW[headlineLevel] ?? 0)
}
