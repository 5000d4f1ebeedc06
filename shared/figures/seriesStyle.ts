import type { Point } from './figureGeometry.ts'
import type { MarkShape } from './markPaths.ts'

/** Biomarkers are told apart by dash and mark; colour only helps. */
export const SERIES_STYLE: readonly { dash?: string; mark?: MarkShape }[] = [
  {},
  { dash: '9 4', mark: 'square' },
  { dash: '5 3', mark: 'triangle' },
  { dash: '2 3', mark: 'disc' },
]

/** Marks stand this far apart along a curve, in figure units. */
const SPACING = 110

/** Places for marks along a line, a little shifted for each series so that they do not coincide. */
export function marksAlong(line: readonly Point[], series: number): Point[] {
  const places: Point[] = []
  let next = SPACING * (0.35 + 0.2 * series)
  let passed = 0
  for (const [at, to] of line.entries()) {
    const from = line[at - 1]
    if (!from) continue
    const length = Math.hypot(to.x - from.x, to.y - from.y)
    while (next <= passed + length) {
      const share = (next - passed) / length
      places.push({ x: from.x + share * (to.x - from.x), y: from.y + share * (to.y - from.y) })
      next += SPACING
    }
    passed += length
  }
  return places
}
