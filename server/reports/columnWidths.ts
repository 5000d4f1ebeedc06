import { textWidth } from '#shared/figures/textWidth.ts'

/** Air for signs of the other font, which run a little wider. */
const SPARE = 1.04

/**
 * Widths for the columns of a table in a given room. Columns that are narrow by nature keep their
 * width, and the widest give way, evenly, until all fit; whatever is left over goes to the first.
 * @param cells every row of the table, its head included
 * @param room in points, without the padding between columns
 */
export function columnWidths(
  cells: readonly (readonly string[])[],
  fontSize: number,
  room: number,
): number[] {
  const columns = cells[0]?.length ?? 0
  const natural = Array.from({ length: columns }, (_, column) =>
    cells.reduce((widest, row) => Math.max(widest, lineWidth(row[column]!, fontSize)), 0),
  )
  const limit = evenLimit(natural, room)
  const widths = natural.map((width) => Math.min(width, limit))
  const left = room - widths.reduce((sum, width) => sum + width, 0)
  return widths.map((width, column) => (column === 0 ? width + Math.max(0, left) : width))
}

function lineWidth(text: string, fontSize: number): number {
  const lines = text.split('\n').map((line) => textWidth(line, fontSize, true))
  return Math.max(...lines) * SPARE + 1
}

/** The width that no column may pass, so that all together fit the room. */
function evenLimit(natural: readonly number[], room: number): number {
  let left = room
  const rising = [...natural].sort((a, b) => a - b)
  for (const [at, width] of rising.entries()) {
    const share = left / (rising.length - at)
    if (width > share) return share
    left -= width
  }
  return Number.POSITIVE_INFINITY
}
