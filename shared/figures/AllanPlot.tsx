import { line } from 'd3-shape'
import { formatConcentration } from '../terms/numbers.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { FigureKey, type KeyEntry, keyHeight } from './FigureKey.tsx'
import { type Box, figureNumber as n, type Point, widthOf } from './figureGeometry.ts'
import { figureThemes } from './figureTheme.ts'
import { marksPath } from './markPaths.ts'
import { PointMark } from './PointMark.tsx'
import { roundTicks } from './roundTicks.ts'
import { valueAxis } from './valueAxis.ts'

export interface AllanPlotPoint {
  tauS: number
  /** Above 0 in the plot; a deviation of 0 has no place on a logarithmic axis. */
  deviation: number
}

export interface AllanPlotProps extends FigureProps {
  points: readonly AllanPlotPoint[]
  minimum: AllanPlotPoint
  /** Of the readings. */
  unit?: string
}

/** Allan deviation over averaging time on two logarithmic axes, with its minimum. */
export function AllanPlot(props: AllanPlotProps) {
  const { id, minimum, unit, width = 560, theme = figureThemes.light } = props
  const points = props.points.filter(({ deviation }) => deviation > 0)
  const plot: Box = {
    left: 70,
    top: 14,
    right: width - 14,
    bottom: 14 + Math.max(210, width * 0.55),
  }
  const times = valueAxis(points.map(({ tauS }) => tauS))
  const deviations = valueAxis(points.map(({ deviation }) => deviation))
  const x = (value: number) => plot.left + times.fractionOf(value) * widthOf(plot)
  const y = (value: number) => plot.bottom - deviations.fractionOf(value) * (plot.bottom - plot.top)
  const places = points.map(({ tauS, deviation }) => ({ x: x(tauS), y: y(deviation) }))
  const guide = whiteNoise(points, deviations.minimum).map(({ tauS, deviation }) => ({
    x: x(tauS),
    y: y(deviation),
  }))
  const key: KeyEntry[] = [
    { label: 'Allan deviation', colour: theme.series[0], strokeWidth: 2.2, mark: 'disc' },
    { label: 'White noise: slope −½', colour: theme.axis, dash: '2 5', strokeWidth: 1.4 },
  ]
  const path = line<Point>(
    (point) => point.x,
    (point) => point.y,
  ).digits(2)
  return (
    <FigureCanvas
      id={id}
      title="Allan deviation"
      description={describeAllanPlot(props)}
      width={width}
      height={plot.bottom + 54 + keyHeight(key, widthOf(plot))}
      theme={theme}
    >
      <path
        d={path(guide) ?? ''}
        fill="none"
        stroke={theme.axis}
        strokeWidth="1.4"
        strokeDasharray="2 5"
      />
      <path d={path(places) ?? ''} fill="none" stroke={theme.series[0]} strokeWidth="2.2" />
      <path
        d={marksPath('disc', places, 3.4)}
        fill={theme.surface}
        stroke={theme.series[0]}
        strokeWidth="1.6"
      />
      <BottomAxis
        plot={plot}
        ticks={roundTicks(times, x, widthOf(plot))}
        label="Averaging time (s, log scale)"
        theme={theme}
      />
      <LeftAxis
        plot={plot}
        ticks={deviations
          .ticks(5)
          .map((value) => ({ at: y(value), text: formatConcentration(value) }))}
        label={`Allan deviation (${unit ? `${unit}, ` : ''}log scale)`}
        theme={theme}
      />
      {minimum.deviation > 0 && (
        <PointMark
          at={{ x: x(minimum.tauS), y: y(minimum.deviation) }}
          label={`${formatConcentration(minimum.tauS)} s`}
          plot={plot}
          lines={[places, guide]}
          theme={theme}
        />
      )}
      <FigureKey
        entries={key}
        left={plot.left}
        top={n(plot.bottom + 52)}
        right={plot.right}
        theme={theme}
      />
    </FigureCanvas>
  )
}

export function describeAllanPlot({ points, minimum, unit }: AllanPlotProps): string {
  const suffix = unit ? ` ${unit}` : ''
  const first = points[0]
  const last = points.at(-1)
  const ends =
    first && last
      ? `From ${formatConcentration(first.deviation)}${suffix} at ${formatConcentration(first.tauS)} s to ${formatConcentration(last.deviation)}${suffix} at ${formatConcentration(last.tauS)} s. `
      : ''
  return `${ends}Smallest at ${formatConcentration(minimum.tauS)} s: ${formatConcentration(minimum.deviation)}${suffix}.`
}

/** Where white noise would lie, from the first point down to the foot of the plot. */
function whiteNoise(points: readonly AllanPlotPoint[], least: number): AllanPlotPoint[] {
  const first = points[0]
  const last = points.at(-1)
  if (!first || !last) return []
  const reach = Math.min(last.tauS, first.tauS * (first.deviation / least) ** 2)
  return [first, { tauS: reach, deviation: first.deviation * Math.sqrt(first.tauS / reach) }]
}
