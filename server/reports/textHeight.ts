import { textWidth } from '#shared/figures/textWidth.ts'

/** Height of a line of Noto Sans as the report sets it, per point of size. */
const LINE = 1.57
/** Ragged line ends leave this share of a line unused at most, in ordinary words. */
const RAGGED = 1.2

/** About how high a text is in a column, in points; rather too high than too low. */
export function textHeight(text: string, fontSize: number, width: number): number {
  const lines = text
    .split('\n')
    .map((line) => Math.max(1, Math.ceil((textWidth(line, fontSize) * RAGGED) / width)))
  return lines.reduce((sum, count) => sum + count, 0) * fontSize * LINE
}

/**
 * The highest text that is kept on one page, in points. pdfmake drops what must not be broken and is
 * longer than a page, so anything higher is allowed to break.
 */
export const MOST_UNBROKEN = 420
