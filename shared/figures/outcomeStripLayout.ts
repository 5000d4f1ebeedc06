import { type CountedColumn, countColumns, subjectsPerMark } from './dotColumns.ts'
import type { Point } from './figureGeometry.ts'
import { swarm } from './swarm.ts'

/** Above this many subjects marks stand for several of them. */
const MOST_SINGLE_MARKS = 600
/** Mark sizes that are tried in turn, in figure units. */
const RADII = [4, 3.2, 2.6, 2.1]
/** Room for the marks of one outcome, across the strip. */
export const STRIP_ROOM = 76
const COLUMN_WIDTH = 7
const COLUMN_MARK = 3
const COLUMN_STEP = 6.6

/** Marks of one outcome; y is 0 along the middle of the strip, or at the foot of its columns. */
export interface StripMarks {
  full: Point[]
  /** Marks that stand for fewer than a full one, with their own radius. */
  part: { point: Point; radius: number }[]
  /** Least and greatest y that the marks reach. */
  reach: { above: number; below: number }
}

export interface StripLayout {
  /** Whether values that lie near each other share a column. */
  grouped: boolean
  /** 1 when every subject has a mark. */
  perMark: number
  radius: number
  strips: StripMarks[]
}

/**
 * Where the marks of each outcome go. Up to some hundred subjects each has its own mark; above that
 * columns of marks of `perMark` subjects each, the rest of a column as one smaller mark whose area is
 * in proportion, so that a single subject far off still shows.
 * @param outcomes places along the axis in figure units, one list for each outcome
 * @param border a place that no column may straddle: the cut-off, so that no mark changes sides
 */
export function layOutStrips(
  outcomes: readonly (readonly number[])[],
  border: number,
): StripLayout {
  const total = outcomes.reduce((sum, places) => sum + places.length, 0)
  if (total <= MOST_SINGLE_MARKS) {
    for (const radius of RADII) {
      const limit = STRIP_ROOM / 2 - radius
      const moves = outcomes.map((places) => swarm(places, 2 * radius + 0.7, limit))
      if (moves.every((move) => move !== null)) return singleMarks(outcomes, moves, radius)
    }
  }
  return columnMarks(outcomes.map((places) => countColumns(places, border, COLUMN_WIDTH)))
}

function singleMarks(
  outcomes: readonly (readonly number[])[],
  moves: readonly (readonly number[])[],
  radius: number,
): StripLayout {
  const strips = outcomes.map((places, outcome) => {
    const across = moves[outcome]!
    const reach = Math.max(9, ...across.map(Math.abs)) + radius
    return {
      full: places.map((x, at) => ({ x, y: across[at]! })),
      part: [],
      reach: { above: reach, below: reach },
    }
  })
  return { grouped: false, perMark: 1, radius, strips }
}

function columnMarks(outcomes: readonly (readonly CountedColumn[])[]): StripLayout {
  const rows = Math.floor(STRIP_ROOM / COLUMN_STEP)
  const perMark = subjectsPerMark(outcomes.flat(), rows)
  const strips = outcomes.map((columns) => {
    const full: Point[] = []
    const part: StripMarks['part'] = []
    let highest = 1
    for (const { x, count } of columns) {
      const whole = Math.floor(count / perMark)
      for (let row = 0; row < whole; row += 1) full.push({ x, y: -(row + 0.5) * COLUMN_STEP })
      const rest = (count % perMark) / perMark
      const radius = Math.max(0.7, COLUMN_MARK * Math.sqrt(rest))
      if (rest > 0) part.push({ point: { x, y: -(whole + 0.5) * COLUMN_STEP }, radius })
      highest = Math.max(highest, whole + (rest > 0 ? 1 : 0))
    }
    return { full, part, reach: { above: highest * COLUMN_STEP, below: 2 } }
  })
  return { grouped: true, perMark, radius: COLUMN_MARK, strips }
}
