import { line } from 'd3-shape'
import { formatConcentration } from '../terms/numbers.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { FigureKey, type KeyEntry, keyHeight } from './FigureKey.tsx'
import { type Box, figureNumber as n, type Point, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { marksPath } from './markPaths.ts'
import { PointMark } from './PointMark.tsx'
import type { PlanCurveAxis, PlanCurveData } from './planCurveTypes.ts'
import { roundTicks } from './roundTicks.ts'
import { marksAlong, SERIES_STYLE } from './seriesStyle.ts'
import { type ValueAxis, valueAxis } from './valueAxis.ts'

export interface PlanCurveProps extends FigureProps {
  curve: PlanCurveData
}

/** The answer of a plan over the assumption that it depends on most, with the plan marked on it. */
export function PlanCurve({ id, curve, width = 470, theme = figureThemes.light }: PlanCurveProps) {
  const plot: Box = {
    left: 70,
    top: 14,
    right: width - 14,
    bottom: 14 + Math.max(190, width * 0.5),
  }
  const axes = axesOf(curve)
  const x = (value: number) => plot.left + axes.x.fractionOf(value) * widthOf(plot)
  const y = (value: number) => plot.bottom - axes.y.fractionOf(value) * (plot.bottom - plot.top)
  const lines = curve.lines.map(({ points }) => unbroken(points, x, y))
  const key =
    curve.lines.length > 1 ? curve.lines.map(({ label }, at) => keyEntry(label, at, theme)) : []
  const ticks = axes.y.ticks(5).map((value) => ({ at: y(value), text: formatConcentration(value) }))
  return (
    <FigureCanvas
      id={id}
      title={curve.title}
      description={describePlanCurve(curve)}
      width={width}
      height={plot.bottom + 50 + (key.length > 0 ? keyHeight(key, widthOf(plot)) + 4 : 0)}
      theme={theme}
    >
      {ticks.map(({ at, text }) => (
        <path
          key={text}
          d={`M${plot.left} ${n(at)}H${n(plot.right)}`}
          stroke={theme.rule}
          fill="none"
        />
      ))}
      <BottomAxis
        plot={plot}
        // Short numbers stand closer than concentrations do.
        ticks={roundTicks(axes.x, x, 1.6 * widthOf(plot))}
        label={axisLabel(curve.x, axes.x)}
        theme={theme}
      />
      <LeftAxis plot={plot} ticks={ticks} label={axisLabel(curve.y, axes.y)} theme={theme} />
      {/* The plan's own line is the first, and lies on top. */}
      {lines
        .map((_, at) => lines.length - 1 - at)
        .map((at) => (
          <PlanLine key={curve.lines[at]!.label} parts={lines[at]!} at={at} theme={theme} />
        ))}
      {curve.mark && (
        <PointMark
          at={{ x: x(curve.mark.x), y: y(curve.mark.y) }}
          label={curve.mark.label}
          plot={plot}
          lines={lines.flat()}
          theme={theme}
        />
      )}
      <FigureKey
        entries={key}
        left={plot.left}
        top={plot.bottom + 50}
        right={plot.right}
        theme={theme}
      />
    </FigureCanvas>
  )
}

/** What a reader who cannot see the figure needs of it. */
export function describePlanCurve({ x, y, lines, mark }: PlanCurveData): string {
  const ends = lines.map(({ label, points }) => {
    const drawn = points.filter((point) => point.y !== null)
    const first = drawn[0]
    const last = drawn.at(-1)
    if (!first || !last) return `${label}: no answer in this range.`
    return `${label}: from ${formatConcentration(first.y!)} at ${formatConcentration(first.x)} to ${formatConcentration(last.y!)} at ${formatConcentration(last.x)}.`
  })
  const plan = mark ? [`The plan: ${mark.label} at ${formatConcentration(mark.x)}.`] : []
  return [`${y.label} against ${x.label.toLowerCase()}.`, ...ends, ...plan].join(' ')
}

function axesOf({ x, y, lines, mark }: PlanCurveData): { x: ValueAxis; y: ValueAxis } {
  const drawn = lines.flatMap(({ points }) =>
    points.flatMap((point) => (point.y === null ? [] : [{ x: point.x, y: point.y }])),
  )
  const all = mark ? [...drawn, mark] : drawn
  return {
    x: valueAxis(
      all.map((point) => point.x),
      x.kind,
    ),
    y: valueAxis(
      all.map((point) => point.y),
      y.kind,
    ),
  }
}

const axisLabel = ({ label, unit }: PlanCurveAxis, { kind }: ValueAxis): string => {
  const inside = [unit, kind === 'log' ? 'log scale' : undefined].filter(Boolean).join(', ')
  return inside ? `${label} (${inside})` : label
}

/** The stretches of a line between places without an answer. */
function unbroken(
  points: PlanCurveData['lines'][number]['points'],
  x: (value: number) => number,
  y: (value: number) => number,
): Point[][] {
  const parts: Point[][] = [[]]
  for (const point of points) {
    if (point.y === null) parts.push([])
    else parts.at(-1)!.push({ x: x(point.x), y: y(point.y) })
  }
  return parts.filter((part) => part.length > 0)
}

function PlanLine({ parts, at, theme }: { parts: Point[][]; at: number; theme: FigureTheme }) {
  const style = SERIES_STYLE[at]!
  const path = line<Point>(
    (point) => point.x,
    (point) => point.y,
  ).digits(2)
  return (
    <>
      <path
        d={parts.map((part) => path(part) ?? '').join('')}
        fill="none"
        stroke={theme.series[at]}
        strokeWidth={at === 0 ? '2.2' : '1.8'}
        strokeDasharray={style.dash}
        strokeLinejoin="round"
      />
      {style.mark && (
        <path
          d={marksPath(
            style.mark,
            parts.flatMap((part) => marksAlong(part, at)),
            3.8,
          )}
          fill={theme.surface}
          stroke={theme.series[at]}
          strokeWidth="1.6"
        />
      )}
    </>
  )
}

const keyEntry = (label: string, at: number, theme: FigureTheme): KeyEntry => ({
  label,
  colour: theme.series[at]!,
  dash: SERIES_STYLE[at]!.dash,
  mark: SERIES_STYLE[at]!.mark,
})
