import type { CustomTableLayout } from 'pdfmake'
import { figureThemes } from '#shared/figures/figureTheme.ts'

/** Everything is in points; A4 is 595.28 by 841.89. */
export const PAGE = { width: 595.28, height: 841.89 }

/** The margin of a sheet stands left of the copper rule, the work right of it. */
export const MARGIN = { left: 34, width: 104, rule: 150, top: 36, bottom: 806 }
export const BODY = { left: 168, top: 74, right: 40, bottom: 72 }
export const BODY_WIDTH = PAGE.width - BODY.left - BODY.right

export const COLOUR = {
  ...figureThemes.light,
  margin: '#f8faf6',
  copperPale: '#fcefe4',
  cautionText: '#5c2a06',
}

export const SIZE = { title: 20, heading: 12.5, text: 9.5, table: 8.5, small: 7.5, tiny: 6.5 }

/** On either side of a column, except at the edges of the table. */
export const CELL_PADDING = 6

/** Hairlines under rows, a stronger one under the head, none at the sides. */
export const TABLE_LAYOUT: CustomTableLayout = {
  hLineWidth: (line, node) => (line === 0 || line === node.table.body.length ? 0 : 0.6),
  hLineColor: (line) => (line === 1 ? COLOUR.axis : COLOUR.rule),
  vLineWidth: () => 0,
  paddingLeft: (column) => (column === 0 ? 0 : CELL_PADDING),
  paddingRight: (column, node) =>
    column === (node.table.widths?.length ?? 0) - 1 ? 0 : CELL_PADDING,
  paddingTop: () => 3,
  paddingBottom: () => 3,
}

/** Label and value pairs have no lines. */
export const PAIRS_LAYOUT: CustomTableLayout = {
  hLineWidth: () => 0,
  vLineWidth: () => 0,
  paddingLeft: () => 0,
  paddingRight: () => 14,
  paddingTop: () => 1.5,
  paddingBottom: () => 1.5,
}

/** The frame of a caution or a stamp. */
export const FRAME_LAYOUT: CustomTableLayout = {
  hLineWidth: () => 0.8,
  vLineWidth: () => 0.8,
  hLineColor: () => COLOUR.copper,
  vLineColor: () => COLOUR.copper,
  paddingLeft: () => 6,
  paddingRight: () => 6,
  paddingTop: () => 4,
  paddingBottom: () => 5,
}
