import { type Box, figureNumber as n } from './figureGeometry.ts'
import type { FigureTheme } from './figureTheme.ts'

export interface EdgeLabel {
  label: string
  value?: string
  colour: string
  /** Height of the line's right end. */
  at: number
}

/** Two lines of text for each label. */
const SPACING = 34

/** Names lines at the right edge of a plot; labels that would touch move apart. */
export function EdgeLabels(props: { labels: readonly EdgeLabel[]; plot: Box; theme: FigureTheme }) {
  const { plot, theme } = props
  const labels = [...props.labels].sort((a, b) => a.at - b.at)
  const places = spread(
    labels.map(({ at }) => at),
    plot.top + SPACING / 2 - 6,
    plot.bottom - SPACING / 2 + 6,
  )
  return (
    <g>
      {labels.map(({ label, value, colour, at }, row) => {
        const y = places[row]!
        return (
          <g key={label}>
            <path
              d={`M${n(plot.right + 3)} ${n(at)}L${n(plot.right + 12)} ${n(y)}`}
              fill="none"
              stroke={colour}
              strokeWidth="0.9"
            />
            <text x={n(plot.right + 18)} y={n(y - 3)} fill={colour} fontWeight="600">
              {label}
            </text>
            <text x={n(plot.right + 18)} y={n(y + 12)} fill={theme.inkQuiet}>
              {value}
            </text>
          </g>
        )
      })}
    </g>
  )
}

/** Rising places at least SPACING apart and, where they fit, between top and bottom. */
function spread(wanted: readonly number[], top: number, bottom: number): number[] {
  const places: number[] = []
  for (const at of wanted) places.push(Math.max(at, (places.at(-1) ?? top - SPACING) + SPACING))
  let below = bottom + SPACING
  for (let row = places.length - 1; row >= 0; row -= 1) {
    places[row] = Math.min(places[row]!, below - SPACING)
    below = places[row]!
  }
  return places
}
