import { FIGURE_FONT_SIZE } from './FigureCanvas.tsx'
import { type Box, figureNumber as n, type Point } from './figureGeometry.ts'
import type { FigureTheme } from './figureTheme.ts'
import { placeLabel } from './placeLabel.ts'
import { textWidth } from './textWidth.ts'

/** A point of a line that matters, with the way to both axes and its number. In ink: copper is for cut-offs. */
export function PointMark(props: {
  at: Point
  label: string
  plot: Box
  lines: readonly (readonly Point[])[]
  theme: FigureTheme
}) {
  const { at, label, plot, lines, theme } = props
  const size = { width: textWidth(label, FIGURE_FONT_SIZE + 1, true), height: 16 }
  const guides = [
    [{ x: at.x, y: plot.bottom }, at],
    [{ x: plot.left, y: at.y }, at],
  ]
  const box = placeLabel({
    anchor: at,
    clearance: 8,
    size,
    frame: plot,
    lines: [...lines, ...guides],
  })
  return (
    <g>
      <path
        d={`M${n(at.x)} ${n(plot.bottom)}V${n(at.y)}H${n(plot.left)}`}
        fill="none"
        stroke={theme.ink}
        strokeDasharray="3 4"
      />
      <circle
        cx={n(at.x)}
        cy={n(at.y)}
        r="5.5"
        fill={theme.ink}
        stroke={theme.surface}
        strokeWidth="2"
      />
      {box && (
        <text
          x={n(box.left)}
          y={n(box.bottom - 4)}
          fontSize={FIGURE_FONT_SIZE + 1}
          fontWeight="600"
          fill={theme.ink}
        >
          {label}
        </text>
      )}
    </g>
  )
}
