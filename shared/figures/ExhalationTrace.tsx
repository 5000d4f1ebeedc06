import { extent, max, nice } from 'd3-array'
import { scaleLinear } from 'd3-scale'
import { line } from 'd3-shape'
import { formatConcentration } from '../terms/numbers.ts'
import type { ExhalationGas, ExhalationSample } from './exhalationSamples.ts'
import { BottomAxis } from './FigureAxes.tsx'
import { FIGURE_FONT_SIZE, FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { type Box, figureNumber as n, type Point, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { fitText, textWidth } from './textWidth.ts'
import { thinPath } from './thinPath.ts'

export interface ExhalationTraceProps extends FigureProps {
  /** From 1. */
  number: number
  /** In the order of time. */
  samples: readonly ExhalationSample[]
  gas: ExhalationGas
  /** The window that the reading stands on; null where the exhalation does not fill it. */
  plateau: { startS: number; endS: number } | null
  accepted: boolean
  /** Nothing is drawn across a longer step in time. */
  gapS: number
}

const PLATEAU = 'plateau'
const HEADS = [14, 31] as const

/** One exhalation: the gas solid, CO2 dashed, each to its own top, and the plateau outlined. */
export function ExhalationTrace(props: ExhalationTraceProps) {
  const { id, number, samples, gas, plateau, gapS, width = 430, theme = figureThemes.light } = props
  const plot: Box = { left: 8, top: 42, right: width - 8, bottom: 162 }
  const tops = topsOf(samples)
  const [first = 0, last = 1] = extent(samples, ({ timeS }) => timeS)
  const x = scaleLinear([first, last], [plot.left, plot.right])
  const y = (top: number) => scaleLinear([0, top], [plot.bottom, plot.top])
  const pathOf = (read: (sample: ExhalationSample) => number | null, top: number) =>
    partsOf(samples, gapS, read)
      .map((part) =>
        drawn(thinPath(part.map(({ timeS, value }) => ({ x: x(timeS), y: y(top)(value) })))),
      )
      .join('')
  const ticks = x.ticks(Math.max(3, widthOf(plot) / 60)).map((timeS) => ({
    at: Math.min(Math.max(x(timeS), plot.left + 8), plot.right - 12),
    text: `${formatConcentration(timeS, 6)} s`,
  }))
  return (
    <FigureCanvas
      id={id}
      title={`Exhalation ${number}: ${gas.label} and CO2`}
      description={describeExhalationTrace(props)}
      width={width}
      height={plot.bottom + 26}
      theme={theme}
    >
      {plateau && (
        <PlateauBox
          plot={plot}
          from={x(plateau.startS)}
          to={x(plateau.endS)}
          accepted={props.accepted}
          theme={theme}
        />
      )}
      <path
        d={pathOf(({ co2Percent }) => co2Percent, tops.co2)}
        fill="none"
        stroke={theme.inkQuiet}
        strokeWidth="1.4"
        strokeDasharray="5 4"
        strokeLinejoin="round"
      />
      <path
        d={pathOf((sample) => sample.gas, tops.gas)}
        fill="none"
        stroke={theme.series[0]}
        strokeWidth="2.4"
        strokeLinejoin="round"
      />
      <text x={plot.left} y={HEADS[0]} fill={theme.series[0]} fontWeight="600">
        {fitText(
          `${gas.label}, to ${formatConcentration(tops.gas)} ${gas.unit}`,
          widthOf(plot),
          FIGURE_FONT_SIZE,
          true,
        )}
      </text>
      <text x={plot.left} y={HEADS[1]}>
        {co2Head(tops.co2)}
      </text>
      <BottomAxis plot={plot} ticks={ticks} theme={theme} />
    </FigureCanvas>
  )
}

/** What a reader who cannot see the curve needs of it. */
export function describeExhalationTrace(props: ExhalationTraceProps): string {
  const { samples, gas, plateau, accepted } = props
  const [first, last] = extent(samples, ({ timeS }) => timeS)
  if (first === undefined || last === undefined) return 'There are no samples to draw.'
  const amount = (value: number) => formatConcentration(value)
  const co2 = max(samples, ({ co2Percent }) => co2Percent) ?? 0
  const most = max(samples, (sample) => sample.gas ?? undefined)
  const gasWords =
    most === undefined
      ? `${gas.label} has no sample here.`
      : `${gas.label} rises to ${amount(most)} ${gas.unit}.`
  const window = plateau
    ? `The plateau from ${amount(plateau.startS)} to ${amount(plateau.endS)} s is outlined${accepted ? '' : ' with dashes: it is left out'}.`
    : 'There is no full plateau to outline.'
  return `From ${amount(first)} to ${amount(last)} s. CO2 rises to ${amount(co2)} %. ${gasWords} ${window}`
}

const co2Head = (top: number) => `CO2 (dashed), to ${formatConcentration(top)} %`

function PlateauBox(props: {
  plot: Box
  from: number
  to: number
  accepted: boolean
  theme: FigureTheme
}) {
  const { plot, from, to, accepted, theme } = props
  const half = textWidth(PLATEAU, FIGURE_FONT_SIZE) / 2
  const middle = Math.min((from + to) / 2, plot.right - half)
  const isFree = middle - half > plot.left + textWidth(co2Head(100.5), FIGURE_FONT_SIZE)
  return (
    <>
      <rect
        x={n(from)}
        y={plot.top - 6}
        width={n(Math.max(0, to - from))}
        height={plot.bottom - plot.top + 6}
        fill={accepted ? theme.seriesBand[0] : 'none'}
        stroke={accepted ? theme.series[0] : theme.ink}
        strokeDasharray={accepted ? undefined : '6 4'}
      />
      {isFree && (
        <text x={n(middle)} y={HEADS[1]} textAnchor="middle">
          {PLATEAU}
        </text>
      )}
    </>
  )
}

/** Round tops of the two scales, which both begin at 0. */
function topsOf(samples: readonly ExhalationSample[]): { co2: number; gas: number } {
  const topOf = (most: number | undefined) => nice(0, most && most > 0 ? most : 1, 6)[1]
  return {
    co2: topOf(max(samples, ({ co2Percent }) => co2Percent)),
    gas: topOf(max(samples, (sample) => sample.gas ?? undefined)),
  }
}

/** The stretches of a curve without a gap and without a missing value. */
function partsOf(
  samples: readonly ExhalationSample[],
  gapS: number,
  read: (sample: ExhalationSample) => number | null,
): { timeS: number; value: number }[][] {
  const parts: { timeS: number; value: number }[][] = []
  let beforeS = Number.NEGATIVE_INFINITY
  for (const sample of samples) {
    const value = read(sample)
    if (value === null) {
      beforeS = Number.NEGATIVE_INFINITY
      continue
    }
    if (sample.timeS - beforeS > gapS) parts.push([])
    // A value below nought is drawn on the axis, not through the words under it.
    parts.at(-1)!.push({ timeS: sample.timeS, value: Math.max(0, value) })
    beforeS = sample.timeS
  }
  return parts
}

const path = line<Point>(
  (point) => point.x,
  (point) => point.y,
).digits(2)
const drawn = (points: readonly Point[]) => path(points as Point[]) ?? ''
