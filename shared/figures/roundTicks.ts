import { formatConcentration } from '../terms/numbers.ts'
import type { AxisTick } from './FigureAxes.tsx'
import { FIGURE_FONT_SIZE } from './FigureCanvas.tsx'
import { textWidth } from './textWidth.ts'
import type { ValueAxis } from './valueAxis.ts'

/** Ticks of a horizontal axis, left to right, leaving out those whose text would touch another. */
export function roundTicks(
  axis: ValueAxis,
  place: (value: number) => number,
  room: number,
): AxisTick[] {
  let free = Number.NEGATIVE_INFINITY
  return axis.ticks(Math.max(3, Math.round(room / 80))).flatMap((value) => {
    const text = formatConcentration(value)
    const half = textWidth(text, FIGURE_FONT_SIZE) / 2
    if (place(value) - half < free) return []
    free = place(value) + half + 10
    return [{ at: place(value), text }]
  })
}
