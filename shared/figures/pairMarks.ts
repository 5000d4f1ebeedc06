import type { Point } from './figureGeometry.ts'

/** Above this many pairs marks stand for several of them. */
const MOST_SINGLE_MARKS = 1500
/** Cells into which many pairs are counted, in figure units. */
const CELL = 6
const LARGEST_RADIUS = 3.2
const SMALLEST_RADIUS = 0.7

export interface PairMarks {
  /** One open ring for each pair; overlapping rings stay visible. */
  rings: readonly Point[]
  ringRadius: number
  /** With many pairs: discs whose area grows with the number of pairs, up to `mostPairs`. */
  discs: { point: Point; radius: number }[]
  mostPairs: number
}

/** Marks for pairs of readings; with thousands of them one disc for each small cell that holds any. */
export function layOutPairs(places: readonly Point[]): PairMarks {
  if (places.length <= MOST_SINGLE_MARKS) {
    const ringRadius = places.length <= 300 ? 3.4 : 2.4
    return { rings: places, ringRadius, discs: [], mostPairs: 1 }
  }
  const cells = new Map<string, { point: Point; count: number }>()
  for (const { x, y } of places) {
    const point = { x: (Math.floor(x / CELL) + 0.5) * CELL, y: (Math.floor(y / CELL) + 0.5) * CELL }
    const key = `${point.x} ${point.y}`
    const cell = cells.get(key)
    if (cell) cell.count += 1
    else cells.set(key, { point, count: 1 })
  }
  const filled = [...cells.values()]
  const mostPairs = filled.reduce((most, { count }) => Math.max(most, count), 1)
  const discs = filled.map(({ point, count }) => ({
    point,
    radius: Math.max(SMALLEST_RADIUS, LARGEST_RADIUS * Math.sqrt(count / mostPairs)),
  }))
  return { rings: [], ringRadius: 0, discs, mostPairs }
}
