import { expect, test } from 'vitest'
import { COURSE_HEIGHT_PX, COURSE_WIDTH, courseCurve } from '../../src/app/courseCurve.ts'

/** Ends of the path's segments: where it certainly passes through. */
function knotsOf(path: string): { x: number; y: number }[] {
  return path
    .split(/(?=[MLC])/)
    .map((segment) => segment.slice(1).split(',').map(Number))
    .map((numbers) => ({ x: numbers.at(-2) ?? Number.NaN, y: numbers.at(-1) ?? Number.NaN }))
}

const courses = Array.from({ length: 12 }, (_, index) => index + 1).flatMap((stations) =>
  Array.from({ length: stations }, (_, endIndex) => ({ stations, endIndex })),
)

test.each(courses)(
  'every mark of $stations stations lies on the curve that falls after station $endIndex',
  ({ stations, endIndex }) => {
    const { path, markYs } = courseCurve(stations, endIndex)
    const knots = knotsOf(path)
    expect(markYs).toHaveLength(stations)
    for (const [station, y] of markYs.entries()) {
      const x = ((station + 0.5) / stations) * COURSE_WIDTH
      const nearest = knots.find((knot) => Math.abs(knot.x - x) < 0.01)
      expect(nearest?.y).toBeCloseTo(y, 2)
      expect(y).toBeGreaterThanOrEqual(0)
      expect(y).toBeLessThanOrEqual(COURSE_HEIGHT_PX)
    }
  },
)

test('the breath climbs from station to station and falls after its last one', () => {
  const { markYs } = courseCurve(8, 5)
  const heights = markYs.map((y) => -y)
  for (let station = 1; station <= 5; station++) {
    expect(heights[station]).toBeGreaterThan(heights[station - 1] ?? Number.NaN)
  }
  expect(heights[6]).toBeLessThan(heights[0] ?? Number.NaN)
  expect(heights[7]).toBe(heights[6])
})
