import { formatConcentration, formatCount } from '../terms/numbers.ts'
import {
  type CalibrationAxis,
  type CalibrationReading,
  calibrationAxisLabel,
  type FoundLevel,
} from './calibrationTypes.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { PairCloud } from './PairCloud.tsx'
import { PointMark } from './PointMark.tsx'
import { layOutPairs } from './pairMarks.ts'
import { roundTicks } from './roundTicks.ts'
import { valueAxis } from './valueAxis.ts'

export interface CalibrationLineProps extends FigureProps {
  readings: readonly CalibrationReading[]
  /** signal = intercept + slope × level */
  line: { intercept: number; slope: number }
  level: CalibrationAxis
  signal: CalibrationAxis
  found?: FoundLevel
}

/** Signal of every standard against its level, the line through them, and the level of a signal. */
export function CalibrationLine(props: CalibrationLineProps) {
  const { id, readings, line, found, width = 470, theme = figureThemes.light } = props
  const plot: Box = {
    left: 66,
    top: 14,
    right: width - 14,
    bottom: 14 + Math.max(210, width * 0.6),
  }
  const levels = valueAxis(
    [...readings.map(({ level }) => level), ...(found ? [found.level] : [])],
    'linear',
  )
  const at = (level: number) => line.intercept + line.slope * level
  const signals = valueAxis(
    [
      ...readings.map(({ signal }) => signal),
      at(levels.minimum),
      at(levels.maximum),
      ...(found ? [found.signal] : []),
    ],
    'linear',
  )
  const x = (value: number) => plot.left + levels.fractionOf(value) * widthOf(plot)
  const y = (value: number) => plot.bottom - signals.fractionOf(value) * (plot.bottom - plot.top)
  const ends = [levels.minimum, levels.maximum].map((level) => ({ x: x(level), y: y(at(level)) }))
  return (
    <FigureCanvas
      id={id}
      title="Calibration line"
      description={describeCalibrationLine(props)}
      width={width}
      height={plot.bottom + 50}
      theme={theme}
    >
      {found?.interval && (
        <Limits
          from={x(found.interval.lower)}
          to={x(found.interval.upper)}
          plot={plot}
          theme={theme}
        />
      )}
      <path
        d={`M${n(ends[0]!.x)} ${n(ends[0]!.y)}L${n(ends[1]!.x)} ${n(ends[1]!.y)}`}
        fill="none"
        stroke={theme.series[0]}
        strokeWidth="2"
      />
      <PairCloud
        marks={layOutPairs(readings.map(({ level, signal }) => ({ x: x(level), y: y(signal) })))}
        theme={theme}
      />
      <BottomAxis
        plot={plot}
        ticks={roundTicks(levels, x, widthOf(plot))}
        label={calibrationAxisLabel(props.level)}
        theme={theme}
      />
      <LeftAxis
        plot={plot}
        ticks={signals
          .ticks(5)
          .map((value) => ({ at: y(value), text: formatConcentration(value) }))}
        label={calibrationAxisLabel(props.signal)}
        theme={theme}
      />
      {found && (
        <PointMark
          at={{ x: x(found.level), y: y(found.signal) }}
          label={formatConcentration(found.level)}
          plot={plot}
          lines={[ends]}
          theme={theme}
        />
      )}
    </FigureCanvas>
  )
}

export function describeCalibrationLine({ readings, line, found }: CalibrationLineProps): string {
  const sign = line.slope < 0 ? '−' : '+'
  const equation = `signal = ${formatConcentration(line.intercept)} ${sign} ${formatConcentration(Math.abs(line.slope))} × level`
  const mark = found
    ? ` A signal of ${formatConcentration(found.signal)} points to ${formatConcentration(found.level)}.`
    : ''
  return `${formatCount(readings.length)} readings of standards, and the line ${equation}.${mark}`
}

/** The limits of a level as a band up from the axis. */
function Limits(props: { from: number; to: number; plot: Box; theme: FigureTheme }) {
  const { from, to, plot, theme } = props
  return (
    <path
      d={`M${n(from)} ${n(plot.bottom)}H${n(to)}V${n(plot.top)}H${n(from)}z`}
      fill={theme.seriesBand[0]}
    />
  )
}
