import { type Box, heightOf, type Point, widthOf } from './figureGeometry.ts'

/** Step of the search, in figure units. */
const STEP = 6
/** Air between a label and whatever it must not touch. */
const AIR = 5

export interface LabelRequest {
  /** What the label belongs to; the label stands clear of it by `clearance`. */
  anchor: Point
  clearance: number
  size: { width: number; height: number }
  /** The label stays inside. */
  frame: Box
  /** Lines that it never crosses. */
  lines: readonly (readonly Point[])[]
  /** Lines that it crosses only where there is no other room. */
  softLines?: readonly (readonly Point[])[]
}

/**
 * The place for a label: inside the frame, off every line, as near to its anchor as that allows and
 * below right of it rather than elsewhere. Null where the frame has no such place.
 */
export function placeLabel(request: LabelRequest): Box | null {
  const { lines, softLines = [] } = request
  const places = candidates(request)
  const hard = lines.flatMap(segments)
  const free = places.filter((box) => !hard.some(([from, to]) => crosses(box, from, to)))
  const soft = softLines.flatMap(segments)
  return free.find((box) => !soft.some(([from, to]) => crosses(box, from, to))) ?? free[0] ?? null
}

function candidates({ anchor, clearance, size, frame }: LabelRequest): Box[] {
  const places: { box: Box; distance: number }[] = []
  const room = { x: widthOf(frame) - size.width, y: heightOf(frame) - size.height }
  for (let dx = 0; dx <= room.x; dx += STEP) {
    for (let dy = 0; dy <= room.y; dy += STEP) {
      const left = frame.left + dx
      const top = frame.top + dy
      const box = { left, top, right: left + size.width, bottom: top + size.height }
      const distance = distanceTo(box, anchor)
      if (distance < clearance) continue
      const belowRight = left > anchor.x && top > anchor.y - size.height
      places.push({ box, distance: distance + (belowRight ? 0 : 2 * STEP) })
    }
  }
  return places.sort((a, b) => a.distance - b.distance).map((place) => place.box)
}

function distanceTo(box: Box, { x, y }: Point): number {
  const across = Math.max(box.left - x, 0, x - box.right)
  const down = Math.max(box.top - y, 0, y - box.bottom)
  return Math.hypot(across, down)
}

function segments(line: readonly Point[]): [Point, Point][] {
  return line.slice(1).map((to, at) => [line[at]!, to])
}

/** Whether the line from one point to the other enters the box with its air (Liang–Barsky). */
function crosses(box: Box, from: Point, to: Point): boolean {
  let enter = 0
  let leave = 1
  const dx = to.x - from.x
  const dy = to.y - from.y
  const sides: [number, number][] = [
    [-dx, from.x - (box.left - AIR)],
    [dx, box.right + AIR - from.x],
    [-dy, from.y - (box.top - AIR)],
    [dy, box.bottom + AIR - from.y],
  ]
  for (const [direction, room] of sides) {
    if (direction === 0 && room < 0) return false
    if (direction < 0) enter = Math.max(enter, room / direction)
    if (direction > 0) leave = Math.min(leave, room / direction)
  }
  return enter <= leave
}
