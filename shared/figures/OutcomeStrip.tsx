import { formatConcentration, formatCount } from '../terms/numbers.ts'
import { BottomAxis } from './FigureAxes.tsx'
import { FIGURE_FONT_SIZE, FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { type MarkShape, markPath, marksPath } from './markPaths.ts'
import { layOutStrips, type StripMarks } from './outcomeStripLayout.ts'
import { roundTicks } from './roundTicks.ts'
import { textWidth } from './textWidth.ts'
import { type ValueAxis, valueAxis } from './valueAxis.ts'

export interface OutcomeStripProps extends FigureProps {
  /** What was measured, such as "Ammonia, end-tidal". */
  label: string
  unit: string
  /** Values of subjects whose reference outcome is present; finite. */
  present: readonly number[]
  absent: readonly number[]
  cutOff?: { value: number; label: string }
  /** The axis that a slider shares; made from the values where none is given. */
  axis?: ValueAxis
  title?: string
}

/** Narrower than this the names stand over the strips instead of beside them. */
const NARROW = 560

/** Left and right end of the axis in a strip of this width, for the slider that lies under it. */
export function outcomeStripEnds(width: number): { left: number; right: number } {
  return { left: width < NARROW ? 14 : 124, right: width - 20 }
}

/** Where the values lie: present as filled discs, absent as open diamonds, on one axis. */
export function OutcomeStrip(props: OutcomeStripProps) {
  const { id, label, unit, present, absent, cutOff, width = 1000 } = props
  const theme = props.theme ?? figureThemes.light
  const axis = props.axis ?? axisOf(props)
  const ends = outcomeStripEnds(width)
  const x = (value: number) => ends.left + axis.fractionOf(value) * (ends.right - ends.left)
  const border = cutOff ? x(cutOff.value) : ends.left
  const layout = layOutStrips([present.map(x), absent.map(x)], border)
  const beside = width >= NARROW
  const [upper, lower] = layout.strips as [StripMarks, StripMarks]
  const upperLine = (cutOff ? 34 : 8) + (beside ? 0 : 20) + upper.reach.above
  const lowerLine = upperLine + upper.reach.below + (beside ? 14 : 30) + lower.reach.above
  const plot: Box = { ...ends, top: cutOff ? 26 : 8, bottom: lowerLine + lower.reach.below + 10 }
  const words = { beside, radius: layout.radius, theme, plot }
  return (
    <FigureCanvas
      id={id}
      title={props.title ?? `${label} by reference outcome`}
      description={describeOutcomeStrip(props)}
      width={width}
      height={plot.bottom + (layout.grouped ? 62 : 46)}
      theme={theme}
    >
      {cutOff && <CutOffLine {...{ cutOff, unit, at: x(cutOff.value), plot, theme }} />}
      <Strip
        {...words}
        name={`Present (${formatCount(present.length)})`}
        marks={upper}
        line={upperLine}
        shape="disc"
        colour={theme.present}
      />
      <Strip
        {...words}
        name={`Absent (${formatCount(absent.length)})`}
        marks={lower}
        line={lowerLine}
        shape="diamond"
        colour={theme.absent}
      />
      <BottomAxis
        plot={plot}
        ticks={roundTicks(axis, x, widthOf(plot))}
        label={`${label} (${unit}${axis.kind === 'log' ? ', log scale' : ''})`}
        theme={theme}
      />
      {layout.grouped && (
        <text x={n((plot.left + plot.right) / 2)} y={n(plot.bottom + 58)} textAnchor="middle">
          {markWords(layout.perMark)}
        </text>
      )}
    </FigureCanvas>
  )
}

export function describeOutcomeStrip(props: OutcomeStripProps): string {
  const { label, unit, present, absent, cutOff } = props
  const span = (name: string, values: readonly number[]) =>
    values.length === 0
      ? `${name}: none.`
      : `${name}: ${formatCount(values.length)}, from ${formatConcentration(least(values))} to ${formatConcentration(-least(values.map((v) => -v)))} ${unit}.`
  const mark = cutOff ? ` The ${cutOff.label} is ${formatConcentration(cutOff.value)} ${unit}.` : ''
  return `${label}. ${span('Present', present)} ${span('Absent', absent)}${mark}`
}

function least(values: readonly number[]): number {
  return values.reduce((low, value) => Math.min(low, value), Number.POSITIVE_INFINITY)
}

/** An axis for these values and the cut-off, if there is one. */
function axisOf({ present, absent, cutOff }: OutcomeStripProps): ValueAxis {
  return valueAxis([...present, ...absent, ...(cutOff ? [cutOff.value] : [])])
}

function markWords(perMark: number): string {
  return perMark === 1
    ? 'Each mark stands for one subject; near values share a column'
    : `Each mark stands for ${formatCount(perMark)} subjects, a smaller one for fewer`
}

function Strip(props: {
  name: string
  marks: StripMarks
  line: number
  shape: MarkShape
  colour: string
  radius: number
  beside: boolean
  plot: Box
  theme: FigureTheme
}) {
  const { name, marks, line, shape, colour, radius, beside, plot, theme } = props
  const open = shape === 'diamond'
  const paint = open
    ? { fill: theme.surface, stroke: colour, strokeWidth: radius < 4 ? 1.1 : 1.5 }
    : { fill: colour, stroke: 'none' }
  const size = open ? radius * 1.1 : radius
  const full = marks.full.map(({ x, y }) => ({ x, y: y + line }))
  const part = marks.part.map(({ point, radius: r }) =>
    markPath(shape, { x: point.x, y: point.y + line }, r),
  )
  const middle = line + (marks.reach.below - marks.reach.above) / 2
  return (
    <g>
      <text
        x={n(beside ? plot.left - 14 : plot.left)}
        y={n(beside ? middle + 4 : line - marks.reach.above - 9)}
        textAnchor={beside ? 'end' : 'start'}
        fill={colour}
        fontWeight="600"
      >
        {name}
      </text>
      <path d={marksPath(shape, full, size) + part.join('')} {...paint} />
    </g>
  )
}

/** The mark: a dashed copper line with the value over it, kept inside the frame. */
function CutOffLine(props: {
  cutOff: { value: number; label: string }
  unit: string
  at: number
  plot: Box
  theme: FigureTheme
}) {
  const { cutOff, unit, at, plot, theme } = props
  const value = `${formatConcentration(cutOff.value)} ${unit}`
  const gap = 8
  const length =
    textWidth(value, FIGURE_FONT_SIZE, true) + gap + textWidth(cutOff.label, FIGURE_FONT_SIZE)
  const start = Math.max(4, Math.min(at - length / 2, plot.right + 16 - length))
  return (
    <g>
      <path
        d={`M${n(at)} ${n(plot.top)}V${n(plot.bottom)}`}
        fill="none"
        stroke={theme.copper}
        strokeDasharray="4 4"
      />
      <text x={n(start)} y="16" fill={theme.copper} fontWeight="600">
        {value}
      </text>
      <text
        x={n(start + textWidth(value, FIGURE_FONT_SIZE, true) + gap)}
        y="16"
        fill={theme.copperText}
      >
        {cutOff.label}
      </text>
    </g>
  )
}
