import { formatConcentration } from '../terms/numbers.ts'
import { type Box, heightOf, figureNumber as n, type Point, widthOf } from './figureGeometry.ts'
import type { FigureTheme } from './figureTheme.ts'
import { placeLabel } from './placeLabel.ts'
import type { RocCutOff } from './rocCurveTypes.ts'
import { fitText, textWidth } from './textWidth.ts'
import { thinPath } from './thinPath.ts'

const VALUE_SIZE = 13.5
const LABEL_SIZE = 12
const LABEL_HEIGHT = 32
/** Farther than this from its mark a label gets a line to it. */
const NEAR = 36

/** The mark on the curve: guide lines to both axes and a label that stands clear of every line. */
export function RocCutOffMark(props: {
  cutOff: RocCutOff
  plot: Box
  lines: readonly (readonly Point[])[]
  theme: FigureTheme
}) {
  const { cutOff, plot, lines, theme } = props
  const at: Point = {
    x: plot.left + cutOff.falsePositiveFraction * widthOf(plot),
    y: plot.bottom - cutOff.sensitivity * heightOf(plot),
  }
  const value = `${formatConcentration(cutOff.value)} ${cutOff.unit}`
  const room = widthOf(plot) * 0.6
  const label = fitText(cutOff.label, room, LABEL_SIZE)
  const place = placeLabel({
    anchor: at,
    clearance: 13,
    size: {
      width: Math.max(textWidth(value, VALUE_SIZE, true), textWidth(label, LABEL_SIZE)),
      height: LABEL_HEIGHT,
    },
    frame: {
      left: plot.left + 6,
      top: plot.top + 4,
      right: plot.right - 4,
      bottom: plot.bottom - 6,
    },
    lines: [...lines.map(coarse), [{ x: at.x, y: plot.bottom }, at, { x: plot.left, y: at.y }]],
    softLines: [
      [
        { x: plot.left, y: plot.bottom },
        { x: plot.right, y: plot.top },
      ],
    ],
  })
  return (
    <g>
      <path
        d={`M${n(at.x)} ${n(plot.bottom)}V${n(at.y)}H${n(plot.left)}`}
        fill="none"
        stroke={theme.copper}
        strokeDasharray="4 4"
      />
      {place && <Leader from={at} to={place} theme={theme} />}
      <circle
        cx={n(at.x)}
        cy={n(at.y)}
        r="7"
        fill={theme.copper}
        stroke={theme.surface}
        strokeWidth="2"
      />
      {place && (
        <>
          <text
            x={n(place.left)}
            y={n(place.top + 12)}
            fill={theme.copper}
            fontSize={VALUE_SIZE}
            fontWeight="600"
          >
            {value}
          </text>
          <text x={n(place.left)} y={n(place.top + 28)} fill={theme.copperText}>
            {label}
          </text>
        </>
      )}
    </g>
  )
}

/** A thin line to a label that had to stand far off. */
function Leader({ from, to, theme }: { from: Point; to: Box; theme: FigureTheme }) {
  const end = {
    x: Math.min(Math.max(from.x, to.left), to.right),
    y: Math.min(Math.max(from.y, to.top), to.bottom),
  }
  const length = Math.hypot(end.x - from.x, end.y - from.y)
  if (length < NEAR) return null
  const share = 1 - 4 / length
  const tip = { x: from.x + share * (end.x - from.x), y: from.y + share * (end.y - from.y) }
  return (
    <path
      d={`M${n(from.x)} ${n(from.y)}L${n(tip.x)} ${n(tip.y)}`}
      stroke={theme.copper}
      strokeWidth="0.8"
      fill="none"
    />
  )
}

/** Enough of a curve to keep clear of it: points at least three units apart. */
function coarse(line: readonly Point[]): Point[] {
  const STEP = 3
  return thinPath(
    line.map((point) => ({
      x: Math.round(point.x / STEP) * STEP,
      y: Math.round(point.y / STEP) * STEP,
    })),
  )
}
