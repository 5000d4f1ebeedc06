import type { Column, Content, TableCell } from 'pdfmake/interfaces'
import { fitText, textWidth } from '#shared/figures/textWidth.ts'
import type { ReportCaution, ReportDocument, ReportPair } from './reportDocument.ts'
import { BODY, BODY_WIDTH, COLOUR, FRAME_LAYOUT, MARGIN, PAGE, SIZE } from './reportStyle.ts'
import { styledText } from './reportText.ts'
import { textHeight } from './textHeight.ts'

/**
 * The margin of a page behind its copper rule: the caution, and on the first page provenance. It is
 * pdfmake's background because a header may not be higher than the space over the text.
 */
export function pageBackground(document: ReportDocument, page: number): Content {
  const provenance = page === 1 ? provenancePlaces(document).margin : []
  const beside = [cautionBox(document.caution, SIZE.small), ...provenance.map(marginPair)]
  return [
    marginStrip(),
    {
      columns: [{ width: MARGIN.width, stack: beside }],
      absolutePosition: { x: MARGIN.left, y: MARGIN.top },
    },
  ]
}

/** A filled cell, since pdfmake lays a cell's fill, such as the caution's, under any drawing. */
function marginStrip(): Content {
  const none = () => 0
  return {
    table: {
      widths: [MARGIN.rule],
      heights: [PAGE.height - 1],
      body: [[{ text: '', fillColor: COLOUR.margin }]],
    },
    layout: {
      hLineWidth: none,
      vLineWidth: (line) => (line === 1 ? 0.9 : 0),
      vLineColor: COLOUR.copper,
      paddingLeft: none,
      paddingRight: none,
      paddingTop: none,
      paddingBottom: none,
    },
    absolutePosition: { x: 0, y: 0 },
  }
}

/**
 * Provenance goes into the margin of the first page as far as that has room, in order; what is left
 * over belongs into the text. The caution must fit, because it stands on every page.
 * @throws RangeError when the caution is too long for the margin
 */
export function provenancePlaces({ caution, provenance }: ReportDocument): {
  margin: ReportPair[]
  text: ReportPair[]
} {
  const width = MARGIN.width - 12
  let room = MARGIN.bottom - MARGIN.top - 60 - textHeight(caution.text, SIZE.small, width)
  if (room < 300) throw new RangeError('The caution is too long for the margin of the report')
  const fitting = provenance.findIndex(({ label, value }) => {
    room -= textHeight(label, SIZE.tiny, MARGIN.width) + textHeight(value, SIZE.small, MARGIN.width)
    room -= 6
    return room < 0
  })
  const split = fitting === -1 ? provenance.length : fitting
  return { margin: provenance.slice(0, split), text: provenance.slice(split) }
}

/** Room for part and stamp in the page's header, in points. */
const HEADER_RIGHT = 250

/** Study and title on the left, part and stamp on the right, a line below. */
export function pageHeader({ header, title }: ReportDocument, page: number): Content {
  const room = BODY_WIDTH - HEADER_RIGHT
  const study = styledText(fitText(header.study, room, SIZE.small, true), {
    bold: true,
    color: COLOUR.ink,
  })
  const left = room - textWidth(header.study, SIZE.small, true) - 12
  const names: Column = {
    width: '*',
    stack: [
      page === 1
        ? study
        : ({
            text: [study, '   ', styledText(fitText(title, Math.max(0, left), SIZE.small))],
          } as Content),
    ],
    margin: [0, 3, 0, 0],
  }
  const part: Column[] = header.part
    ? [
        {
          width: 'auto',
          stack: [styledText(header.part, { bold: true })],
          margin: [0, 3, 0, 0],
        },
      ]
    : []
  const stamp: Column[] = header.stamp ? [stampBox(header.stamp)] : []
  return {
    margin: [BODY.left, 30, BODY.right, 0],
    fontSize: SIZE.small,
    color: COLOUR.inkQuiet,
    stack: [{ columns: [names, ...part, ...stamp], columnGap: 12 }, rule(4)],
  }
}

/** The whole hash and the page's number. */
export function pageFooter(document: ReportDocument, page: number, pages: number): Content {
  return {
    margin: [BODY.left, 22, BODY.right, 0],
    fontSize: SIZE.tiny,
    color: COLOUR.inkQuiet,
    stack: [
      rule(0),
      {
        margin: [0, 5, 0, 0],
        columns: [
          {
            width: '*',
            text: [
              'Dataset SHA-256  ',
              { text: document.datasetHash, font: 'DejaVu Sans Mono', fontSize: 6.2 },
            ],
          },
          { width: 'auto', text: `page ${page} of ${pages}`, fontSize: SIZE.small },
        ],
      },
    ],
  }
}

/** A caution in its copper frame. */
export function cautionBox({ heading, text }: ReportCaution, fontSize: number): Content {
  const cell: Content = {
    stack: [styledText(heading, { bold: true }), styledText(text)],
    fillColor: COLOUR.copperPale,
    color: COLOUR.cautionText,
    fontSize,
  }
  return {
    table: { widths: ['*'], body: [[cell]] },
    layout: FRAME_LAYOUT,
    margin: [0, 0, 0, 10],
  }
}

function marginPair({ label, value }: ReportPair): Content {
  return {
    stack: [
      styledText(label, { fontSize: SIZE.tiny, color: COLOUR.inkQuiet }),
      styledText(value, { fontSize: SIZE.small, color: COLOUR.ink }),
    ],
    margin: [0, 0, 0, 6],
  }
}

function stampBox(stamp: string): Column {
  const cell = styledText(stamp, { bold: true, color: COLOUR.copper, noWrap: true }) as TableCell
  return {
    width: 'auto',
    table: { body: [[cell]] },
    layout: { ...FRAME_LAYOUT, paddingTop: () => 2, paddingBottom: () => 0.5 },
  }
}

function rule(above: number): Content {
  return {
    canvas: [
      { type: 'line', x1: 0, y1: 0, x2: BODY_WIDTH, y2: 0, lineWidth: 0.6, lineColor: COLOUR.rule },
    ],
    margin: [0, above, 0, 0],
  }
}
