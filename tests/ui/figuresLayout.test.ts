import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { Point } from '#shared/figures/figureGeometry.ts'
import { layOutStrips } from '#shared/figures/outcomeStripLayout.ts'
import { layOutPairs } from '#shared/figures/pairMarks.ts'
import { placeLabel } from '#shared/figures/placeLabel.ts'
import { swarm } from '#shared/figures/swarm.ts'
import { fitText, textWidth } from '#shared/figures/textWidth.ts'
import { thinPath } from '#shared/figures/thinPath.ts'
import { valueAxis } from '#shared/figures/valueAxis.ts'

/** Staircases of a ROC curve, drawn in a plot of 400 units. */
const staircases = fc
  .array(fc.tuple(fc.boolean(), fc.double({ min: 0, max: 5, noNaN: true })), {
    minLength: 2,
    size: 'max',
    maxLength: 400,
  })
  .map((steps) => {
    let at: Point = { x: 0, y: 400 }
    return [
      at,
      ...steps.map(([across, length]) => {
        at = across
          ? { x: Math.min(400, at.x + length), y: at.y }
          : { x: at.x, y: Math.max(0, at.y - length) }
        return at
      }),
    ]
  })

function distanceToSegment(point: Point, from: Point, to: Point): number {
  const dx = to.x - from.x
  const dy = to.y - from.y
  const length = dx * dx + dy * dy
  const share = length === 0 ? 0 : ((point.x - from.x) * dx + (point.y - from.y) * dy) / length
  const on = Math.min(1, Math.max(0, share))
  return Math.hypot(point.x - from.x - on * dx, point.y - from.y - on * dy)
}

function segments(line: readonly Point[]): [Point, Point][] {
  return line.slice(1).map((to, at) => [line[at]!, to])
}

function distanceToLine(point: Point, line: readonly Point[]): number {
  const distances = segments(line).map(([from, to]) => distanceToSegment(point, from, to))
  return Math.min(Math.hypot(point.x - line[0]!.x, point.y - line[0]!.y), ...distances)
}

/** A tenth of a unit along either axis. */
const UNSEEN = 0.1 * Math.SQRT2 + 1e-6

test('a thinned curve passes every point of the whole one closer than the eye can tell', async () => {
  await fc.assert(
    fc.property(staircases, (line) => {
      const thin = thinPath(line)
      expect(thin[0]).toEqual(line[0])
      for (const point of line) expect(distanceToLine(point, thin)).toBeLessThan(UNSEEN)
      for (const point of thin) expect(distanceToLine(point, line)).toBeLessThan(UNSEEN)
    }),
    { numRuns: 60 },
  )
})

test('thinning drops the middle of a straight line and keeps every step', () => {
  const steps = [0, 1, 2, 3].map((x) => ({ x, y: 10 }))
  expect(thinPath([...steps, { x: 3, y: 4 }])).toEqual([
    { x: 0, y: 10 },
    { x: 3, y: 10 },
    { x: 3, y: 4 },
  ])
})

test('a label lies inside the frame and no curve passes through it', async () => {
  const frame = { left: 0, top: 0, right: 400, bottom: 400 }
  await fc.assert(
    fc.property(staircases, staircases, fc.nat(400), (line, other, chosen) => {
      const anchor = line[chosen % line.length]!
      const size = { width: 110, height: 32 }
      const box = placeLabel({ anchor, clearance: 13, size, frame, lines: [line, other] })
      if (!box) throw new Error('Two rising curves always leave room for a label')
      expect(box.left).toBeGreaterThanOrEqual(frame.left)
      expect(box.right).toBeLessThanOrEqual(frame.right)
      expect(box.top).toBeGreaterThanOrEqual(frame.top)
      expect(box.bottom).toBeLessThanOrEqual(frame.bottom)
      for (const [from, to] of [...segments(line), ...segments(other)]) {
        for (let share = 0; share <= 1; share += 0.1) {
          const x = from.x + share * (to.x - from.x)
          const y = from.y + share * (to.y - from.y)
          const isInside = x > box.left && x < box.right && y > box.top && y < box.bottom
          expect(isInside).toBe(false)
        }
      }
    }),
    { numRuns: 60 },
  )
})

test('a label that fits nowhere is not placed', () => {
  const frame = { left: 0, top: 0, right: 50, bottom: 50 }
  const size = { width: 80, height: 20 }
  expect(placeLabel({ anchor: { x: 9, y: 9 }, clearance: 5, size, frame, lines: [] })).toBeNull()
})

test('marks of a swarm never cover each other and keep their place along the axis', async () => {
  const places = fc.array(
    fc.nat(600).map((tenths) => tenths / 10),
    { minLength: 20, maxLength: 80 },
  )
  await fc.assert(
    fc.property(places, (xs) => {
      const moves = swarm(xs, 8, 1e6)
      if (!moves) throw new Error('Without a limit every swarm has room')
      for (const [a, xa] of xs.entries()) {
        for (const [b, xb] of xs.entries()) {
          if (b <= a) continue
          expect(Math.hypot(xa - xb, moves[a]! - moves[b]!)).toBeGreaterThanOrEqual(8 - 1e-6)
        }
      }
      expect(swarm(xs, 8, 1e6)).toEqual(moves)
    }),
    { numRuns: 60 },
  )
})

test('up to some hundred subjects have a mark each, at their own place', () => {
  const places = Array.from({ length: 120 }, (_, at) => 100 + at * 6)
  const layout = layOutStrips([places, places], 0)
  expect(layout.grouped).toBe(false)
  expect(layout.strips.map(({ full }) => full.map(({ x }) => x))).toEqual([places, places])
})

test('columns of many subjects hold all of them, and one far off still shows', () => {
  const crowd = Array.from({ length: 5000 }, (_, at) => 300 + (at % 90))
  const layout = layOutStrips([[...crowd, 790], []], 0)
  const [strip] = layout.strips
  const { perMark } = layout
  expect(layout.grouped).toBe(true)
  expect(strip!.full.length * perMark).toBeLessThanOrEqual(5001)
  expect((strip!.full.length + strip!.part.length) * perMark).toBeGreaterThanOrEqual(5001)
  const far = strip!.part.filter(({ point }) => point.x > 780)
  expect(far).toHaveLength(1)
  expect(far[0]!.radius).toBeLessThan(layout.radius)
})

test('no column reaches over the cut-off', () => {
  const below = Array.from({ length: 500 }, () => 399.9)
  const above = Array.from({ length: 500 }, () => 400)
  const [strip] = layOutStrips([[...below, ...above], []], 400).strips
  const marks = [...strip!.full, ...strip!.part.map(({ point }) => point)]
  expect(marks.some(({ x }) => x < 400)).toBe(true)
  expect(marks.some(({ x }) => x > 400)).toBe(true)
  for (const { x } of marks) expect(Math.abs(x - 400)).toBeGreaterThanOrEqual(3)
})

test('pairs have a ring each until there are thousands, then discs that grow with their number', () => {
  const few = Array.from({ length: 50 }, (_, at) => ({ x: at, y: at }))
  expect(layOutPairs(few).rings).toHaveLength(50)
  const many = [
    ...Array.from({ length: 3000 }, () => ({ x: 10, y: 10 })),
    ...Array.from({ length: 750 }, () => ({ x: 100, y: 100 })),
  ]
  const { discs, mostPairs } = layOutPairs(many)
  expect(mostPairs).toBe(3000)
  expect(discs).toHaveLength(2)
  expect(discs[0]!.radius / discs[1]!.radius).toBeCloseTo(2, 6)
})

test('an axis of concentrations is logarithmic and gives back the value of each place', () => {
  const axis = valueAxis([120, 6000])
  expect(axis.kind).toBe('log')
  for (const value of [120, 700, 1180, 6000]) {
    expect(axis.valueAt(axis.fractionOf(value))).toBeCloseTo(value, 6)
  }
  expect(axis.fractionOf(120)).toBeGreaterThan(0)
  expect(axis.fractionOf(6000)).toBeLessThan(1)
  expect(axis.ticks(6)).toEqual([200, 500, 1000, 2000, 5000])
})

test('an axis is linear as soon as one value is not above nought', () => {
  expect(valueAxis([0, 5]).kind).toBe('linear')
  expect(valueAxis([-3, 5]).kind).toBe('linear')
  expect(valueAxis([]).kind).toBe('linear')
})

test('an axis of one value has room on both sides, and refuses what is not finite', () => {
  const axis = valueAxis([42, 42])
  expect(axis.fractionOf(42)).toBeCloseTo(0.5, 6)
  expect(() => valueAxis([1, Number.NaN])).toThrow(RangeError)
})

test('text is measured as the font sets it, and cut with an ellipsis where there is no room', () => {
  // Advance widths of "A" (639) and "b" (615) in the font's hmtx table, per thousand.
  expect(textWidth('Ab', 12)).toBeCloseTo((639 + 615) * 0.012, 6)
  expect(fitText('Ammonia', 200, 12)).toBe('Ammonia')
  const cut = fitText('Ammonia in exhaled breath', 80, 12)
  expect(cut).toMatch(/^Ammonia.*…$/)
  expect(textWidth(cut, 12)).toBeLessThanOrEqual(80)
})
