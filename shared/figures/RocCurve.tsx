import { type ScaleLinear, scaleLinear } from 'd3-scale'
import { line } from 'd3-shape'
import { formatConcentration, formatEstimate, formatInterval } from '../terms/numbers.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { FigureKey, type KeyEntry, keyHeight } from './FigureKey.tsx'
import { type Box, figureNumber as n, type Point } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { marksPath } from './markPaths.ts'
import { RocCutOffMark } from './RocCutOffMark.tsx'
import type { RocCurveSeries, RocCutOff } from './rocCurveTypes.ts'
import { marksAlong, SERIES_STYLE } from './seriesStyle.ts'
import { thinPath } from './thinPath.ts'

export interface RocCurveProps extends FigureProps {
  /** One to four biomarkers in a fixed order: the first is solid, the others are dashed and marked. */
  curves: readonly RocCurveSeries[]
  cutOff?: RocCutOff
  title?: string
}

/** Sensitivity against 1 − specificity over every threshold. */
export function RocCurve(props: RocCurveProps) {
  const { id, curves, cutOff, width = 470, theme = figureThemes.light } = props
  const side = width - 66
  const plot: Box = { left: 52, top: 12, right: 52 + side, bottom: 12 + side }
  const x = scaleLinear([0, 1], [plot.left, plot.right])
  const y = scaleLinear([0, 1], [plot.bottom, plot.top])
  const lines = curves.map(({ points }) =>
    thinPath(
      points.map((point) => ({ x: x(point.falsePositiveFraction), y: y(point.sensitivity) })),
    ),
  )
  const key = curves.length > 1 ? curves.map((curve, at) => keyEntry(curve, at, theme)) : []
  const ticks = [0, 0.25, 0.5, 0.75, 1]
  return (
    <FigureCanvas
      id={id}
      title={props.title ?? `ROC curve: ${curves.map(({ label }) => label).join(', ')}`}
      description={describeRocCurve(props)}
      width={width}
      height={plot.bottom + 50 + (key.length > 0 ? keyHeight(key, side) + 8 : 0)}
      theme={theme}
    >
      {curves.map(
        ({ label, band }, at) => band && <Band key={label} {...{ band, at, x, y, theme }} />,
      )}
      <BottomAxis
        plot={plot}
        ticks={ticks.map((value) => ({ at: x(value), text: String(value) }))}
        label="1 − specificity"
        theme={theme}
      />
      <LeftAxis
        plot={plot}
        ticks={ticks.map((value) => ({ at: y(value), text: String(value) }))}
        label="Sensitivity"
        theme={theme}
      />
      <path
        d={`M${plot.left} ${plot.bottom}L${plot.right} ${plot.top}`}
        fill="none"
        stroke={theme.axis}
        strokeDasharray="2 5"
      />
      {curves.map(({ label }, at) => (
        <Curve key={label} points={lines[at]!} at={at} theme={theme} />
      ))}
      {cutOff && <RocCutOffMark {...{ cutOff, plot, lines, theme }} />}
      {key.length > 0 && (
        <FigureKey
          entries={key}
          left={plot.left}
          top={plot.bottom + 52}
          right={plot.right}
          theme={theme}
        />
      )}
    </FigureCanvas>
  )
}

/** What a reader who cannot see the figure needs of it. */
export function describeRocCurve({ curves, cutOff }: Pick<RocCurveProps, 'curves' | 'cutOff'>) {
  const areas = curves.map(({ label, area: a }) =>
    a
      ? `${label}: area ${formatEstimate(a.estimate)} (95 % interval ${formatInterval(a.lower, a.upper)}).`
      : `${label}.`,
  )
  if (!cutOff) return areas.join(' ')
  const mark = `At ${formatConcentration(cutOff.value)} ${cutOff.unit} (${cutOff.label}) sensitivity is ${formatEstimate(cutOff.sensitivity)} and specificity ${formatEstimate(1 - cutOff.falsePositiveFraction)}.`
  return [...areas, mark].join(' ')
}

function Curve({ points, at, theme }: { points: Point[]; at: number; theme: FigureTheme }) {
  const style = SERIES_STYLE[at]!
  const path = line<Point>(
    (point) => point.x,
    (point) => point.y,
  ).digits(2)
  return (
    <>
      <path
        d={path(points) ?? ''}
        fill="none"
        stroke={theme.series[at]}
        strokeWidth="2.2"
        strokeDasharray={style.dash}
        strokeLinejoin="round"
      />
      {style.mark && (
        <path
          d={marksPath(style.mark, marksAlong(points, at), 4.2)}
          fill={theme.surface}
          stroke={theme.series[at]}
          strokeWidth="1.6"
        />
      )}
    </>
  )
}

function Band(props: {
  band: NonNullable<RocCurveSeries['band']>
  at: number
  x: ScaleLinear<number, number>
  y: ScaleLinear<number, number>
  theme: FigureTheme
}) {
  const { band, at, x, y, theme } = props
  const upper = thinPath(band.map((b) => ({ x: x(b.falsePositiveFraction), y: y(b.upper) })))
  const lower = thinPath(band.map((b) => ({ x: x(b.falsePositiveFraction), y: y(b.lower) })))
  const outline = [...upper, ...lower.reverse()]
  const path = outline.map((point, step) => `${step ? 'L' : 'M'}${n(point.x)} ${n(point.y)}`)
  return (
    <path d={`${path.join('')}z`} fill={theme.seriesBand[at]} fillOpacity={at === 0 ? 1 : 0.7} />
  )
}

function keyEntry(curve: RocCurveSeries, at: number, theme: FigureTheme): KeyEntry {
  const { area: a } = curve
  return {
    label: curve.label,
    value: a && `area ${formatEstimate(a.estimate)} (${formatInterval(a.lower, a.upper)})`,
    colour: theme.series[at]!,
    dash: SERIES_STYLE[at]!.dash,
    mark: SERIES_STYLE[at]!.mark,
  }
}
