import { curveMonotoneX, line } from 'd3-shape'

/** Height of the drawing in CSS pixels; its width is whatever the window gives. */
export const COURSE_HEIGHT_PX = 30
/** Width of the drawing in its own units, stretched to the window. */
export const COURSE_WIDTH = 1_000

const REST_Y = 28
const RISING_Y = 26
const PLATEAU_START_Y = 9
const PLATEAU_END_Y = 1.5
/** Where the fall reaches rest, in stations after the last one on the plateau. */
const FALL = 0.55

type Point = { x: number; y: number }

/**
 * One exhalation through all stations: rest, a quick rise, a slowly climbing plateau, and the fall
 * after the station `endIndex`. Every mark is a knot of the curve, so it lies exactly on it.
 * @returns the path in units of COURSE_WIDTH × COURSE_HEIGHT_PX, and the height of each mark in pixels
 */
export function courseCurve(stationCount: number, endIndex: number) {
  const xOf = (station: number) => ((station + 0.5) / stationCount) * COURSE_WIDTH
  const marks = Array.from({ length: stationCount }, (_, station) => ({
    x: xOf(station),
    y: heightAt(station, endIndex),
  }))
  const falls = endIndex < stationCount - 1
  const knots: Point[] = [
    { x: 0, y: REST_Y },
    { x: xOf(-0.2), y: REST_Y },
    ...marks.slice(0, endIndex + 1),
    ...(falls ? [{ x: xOf(endIndex + FALL), y: RISING_Y + 1 }] : []),
    ...marks.slice(endIndex + 1),
    { x: COURSE_WIDTH, y: falls ? REST_Y - 1 : PLATEAU_END_Y },
  ]
  const path = line<Point>()
    .x((knot) => knot.x)
    .y((knot) => knot.y)
    .curve(curveMonotoneX)(knots)
  return { path: path ?? '', markYs: marks.map((mark) => mark.y) }
}

function heightAt(station: number, endIndex: number): number {
  if (station > endIndex) return REST_Y - 1
  if (station === 0) return RISING_Y
  if (endIndex === 1) return PLATEAU_START_Y
  const along = (station - 1) / (endIndex - 1)
  return PLATEAU_START_Y - (PLATEAU_START_Y - PLATEAU_END_Y) * (1 - (1 - along) ** 1.6)
}
