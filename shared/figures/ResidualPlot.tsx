import { formatConcentration, formatCount } from '../terms/numbers.ts'
import { type CalibrationAxis, calibrationAxisLabel } from './calibrationTypes.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import { figureThemes } from './figureTheme.ts'
import { PairCloud } from './PairCloud.tsx'
import { layOutPairs } from './pairMarks.ts'
import { roundTicks } from './roundTicks.ts'
import { valueAxis } from './valueAxis.ts'

/** What the line makes of one reading, against the level of its standard. */
export interface Residual {
  level: number
  /** Percent of the level. */
  percent: number
}

export interface ResidualPlotProps extends FigureProps {
  residuals: readonly Residual[]
  level: CalibrationAxis
  /** Percent of the level either way that is still acceptable. */
  limitPercent: number
}

/** How far each standard lies from the line, in percent of its level, with the limit either way. */
export function ResidualPlot(props: ResidualPlotProps) {
  const { id, residuals, limitPercent, width = 470, theme = figureThemes.light } = props
  const plot: Box = {
    left: 66,
    top: 14,
    right: width - 14,
    bottom: 14 + Math.max(170, width * 0.34),
  }
  const levels = valueAxis(residuals.map(({ level }) => level))
  const percents = valueAxis(
    [...residuals.map(({ percent }) => percent), 0, -limitPercent, limitPercent],
    'linear',
  )
  const x = (value: number) => plot.left + levels.fractionOf(value) * widthOf(plot)
  const y = (value: number) => plot.bottom - percents.fractionOf(value) * (plot.bottom - plot.top)
  const across = (value: number) => `M${plot.left} ${n(y(value))}H${n(plot.right)}`
  const suffix = levels.kind === 'log' ? ', log scale' : ''
  return (
    <FigureCanvas
      id={id}
      title="Residuals of the calibration"
      description={describeResiduals(props)}
      width={width}
      height={plot.bottom + 50}
      theme={theme}
    >
      <path
        d={`M${plot.left} ${n(y(limitPercent))}H${n(plot.right)}V${n(y(-limitPercent))}H${plot.left}z`}
        fill={theme.seriesBand[0]}
      />
      <path d={across(0)} stroke={theme.axis} fill="none" />
      <path
        d={across(limitPercent) + across(-limitPercent)}
        stroke={theme.ink}
        strokeDasharray="7 4"
        fill="none"
      />
      <PairCloud
        marks={layOutPairs(residuals.map(({ level, percent }) => ({ x: x(level), y: y(percent) })))}
        theme={theme}
      />
      <BottomAxis
        plot={plot}
        ticks={roundTicks(levels, x, widthOf(plot))}
        label={`${calibrationAxisLabel(props.level)}${suffix}`}
        theme={theme}
      />
      <LeftAxis
        plot={plot}
        ticks={percents
          .ticks(5)
          .map((value) => ({ at: y(value), text: formatConcentration(value) }))}
        label="Residual (% of level)"
        theme={theme}
      />
    </FigureCanvas>
  )
}

export function describeResiduals({ residuals, limitPercent }: ResidualPlotProps): string {
  const beyond = residuals.filter(({ percent }) => Math.abs(percent) > limitPercent).length
  return `${formatCount(residuals.length)} readings; ${formatCount(beyond)} of them further than ${formatConcentration(limitPercent)} % from the level of their standard.`
}
