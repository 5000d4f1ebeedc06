import type { Point } from './figureGeometry.ts'

/** Fifth of a figure unit: no point is moved by more than a tenth of a unit along either axis. */
const GRID = 5

/**
 * A polyline with the points that cannot be seen apart left out: points are moved to a fine grid,
 * repeats are dropped, and so is the middle of three on one straight line. First and last point stay
 * where they are, a step stays a step, and the time is proportional to the number of points.
 */
export function thinPath(points: readonly Point[]): Point[] {
  const kept: Point[] = []
  for (const [at, point] of points.entries()) {
    const end = at === 0 || at === points.length - 1
    const next = end
      ? point
      : { x: Math.round(point.x * GRID) / GRID, y: Math.round(point.y * GRID) / GRID }
    const last = kept.at(-1)
    if (last && last.x === next.x && last.y === next.y) continue
    const before = kept.at(-2)
    if (before && last && liesBetween(before, last, next)) kept.pop()
    kept.push(next)
  }
  return kept
}

/** Whether `middle` lies on the straight way from `from` to `to`, in that order. */
function liesBetween(from: Point, middle: Point, to: Point): boolean {
  const ahead = { x: middle.x - from.x, y: middle.y - from.y }
  const on = { x: to.x - middle.x, y: to.y - middle.y }
  const cross = ahead.x * on.y - ahead.y * on.x
  return Math.abs(cross) < 1e-9 && ahead.x * on.x + ahead.y * on.y > 0
}
