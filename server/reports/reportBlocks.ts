import type { Content, TableCell } from 'pdfmake/interfaces'
import { textWidth } from '#shared/figures/textWidth.ts'
import { columnWidths } from './columnWidths.ts'
import { figureSvg } from './figureSvg.ts'
import type { ReportBlock, ReportFigure, ReportPair, ReportTable } from './reportDocument.ts'
import { cautionBox } from './reportPage.ts'
import {
  BODY_WIDTH,
  CELL_PADDING,
  COLOUR,
  PAIRS_LAYOUT,
  SIZE,
  TABLE_LAYOUT,
} from './reportStyle.ts'
import { styledText } from './reportText.ts'
import { MOST_UNBROKEN, textHeight } from './textHeight.ts'

/** One block of a section as pdfmake's content. */
export function blockContent(block: ReportBlock): Content {
  switch (block.kind) {
    case 'paragraph':
      return styledText(block.text, {
        margin: [0, 0, 0, 7],
        ...(block.quiet ? { color: COLOUR.inkQuiet, fontSize: SIZE.table } : {}),
      })
    case 'subheading':
      return styledText(block.text, { bold: true, headlineLevel: 2, margin: [0, 6, 0, 4] })
    case 'keyValues':
      return pairsContent(block.pairs)
    case 'table':
      return tableContent(block)
    case 'figure':
      return figureContent(block)
    case 'caution':
      return cautionBox(block, SIZE.table)
  }
}

/** Whether a block has to stay on one page with the headlines over it. */
export function isKeptWhole(block: ReportBlock): boolean {
  if (block.kind === 'figure') return textHeight(block.caption, SIZE.small, BODY_WIDTH) < 60
  return block.kind === 'caution' && staysWhole(block.text, SIZE.table, BODY_WIDTH)
}

function staysWhole(text: string, fontSize: number, width: number): boolean {
  return textHeight(text, fontSize, width) < MOST_UNBROKEN
}

function pairsContent(pairs: readonly ReportPair[]): Content {
  const natural = Math.max(0, ...pairs.map(({ label }) => textWidth(label, SIZE.text)))
  const labels = Math.min(natural + 3, BODY_WIDTH * 0.4)
  const values = BODY_WIDTH - labels - 14
  return {
    table: {
      widths: [labels, '*'],
      dontBreakRows: pairs.every(({ value }) => staysWhole(value, SIZE.text, values)),
      body: pairs.map(({ label, value }): TableCell[] => [
        styledText(label, { color: COLOUR.inkQuiet }) as TableCell,
        styledText(value) as TableCell,
      ]),
    },
    layout: PAIRS_LAYOUT,
    margin: [0, 0, 0, 9],
  }
}

/** The head repeats on each page, and no row is torn. */
function tableContent({ caption, columns, rows }: ReportTable): Content {
  for (const row of rows) {
    if (row.length !== columns.length) {
      throw new RangeError(`A row of ${row.length} cells in a table of ${columns.length} columns`)
    }
  }
  const cell = (text: string, column: number, style: Record<string, unknown> = {}) =>
    styledText(text, { alignment: columns[column]!.align ?? 'left', ...style }) as TableCell
  const fontSize = columns.length > 8 ? SIZE.tiny : columns.length > 6 ? SIZE.small : SIZE.table
  const head = { bold: true, color: COLOUR.inkQuiet, fontSize: Math.min(SIZE.small, fontSize) }
  const room = BODY_WIDTH - 2 * CELL_PADDING * (columns.length - 1)
  const widths = columnWidths([columns.map(({ label }) => label), ...rows], fontSize, room)
  const whole = rows.every((row) =>
    row.every((text, column) => staysWhole(text, fontSize, widths[column]!)),
  )
  return [
    ...(caption
      ? [styledText(caption, { bold: true, headlineLevel: 2, margin: [0, 2, 0, 2] })]
      : []),
    {
      fontSize,
      table: {
        headerRows: 1,
        keepWithHeaderRows: whole ? 1 : 0,
        dontBreakRows: whole,
        widths,
        body: [
          columns.map(({ label }, column) => cell(label, column, head)),
          ...rows.map((row) => row.map((text, column) => cell(text, column))),
        ],
      },
      layout: TABLE_LAYOUT,
      margin: [0, 0, 0, 12],
    },
  ]
}

/** Leaves room for a caption and headlines on the same page. */
const MOST_FIGURE_HEIGHT = 560

function figureContent({ figure, caption, share = 1 }: ReportFigure): Content {
  return {
    stack: [
      {
        svg: figureSvg(figure),
        fit: [BODY_WIDTH * Math.min(1, share), MOST_FIGURE_HEIGHT],
        font: 'Noto Sans',
      },
      styledText(caption, {
        fontSize: SIZE.small,
        color: COLOUR.inkQuiet,
        margin: [0, 4, 0, 0],
      }),
    ],
    margin: [0, 2, 0, 12],
  } as Content
}
