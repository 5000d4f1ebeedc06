import { type Box, figureNumber as n } from './figureGeometry.ts'
import type { FigureTheme } from './figureTheme.ts'

export interface AxisTick {
  /** Place along the axis in figure units. */
  at: number
  text: string
}

/** The horizontal axis along the bottom of the plot, its ticks and its name. */
export function BottomAxis(props: {
  plot: Box
  ticks: readonly AxisTick[]
  label?: string
  theme: FigureTheme
}) {
  const { plot, ticks, label, theme } = props
  const marks = ticks.map(({ at }) => `M${n(at)} ${n(plot.bottom)}v4`).join('')
  return (
    <g>
      <path
        d={`M${n(plot.left)} ${n(plot.bottom)}H${n(plot.right)}${marks}`}
        fill="none"
        stroke={theme.axis}
      />
      {ticks.map(({ at, text }) => (
        <text key={text} x={n(at)} y={n(plot.bottom + 19)} textAnchor="middle">
          {text}
        </text>
      ))}
      {label && (
        <text x={n((plot.left + plot.right) / 2)} y={n(plot.bottom + 41)} textAnchor="middle">
          {label}
        </text>
      )}
    </g>
  )
}

/** The vertical axis along the left of the plot; its name runs upwards. */
export function LeftAxis(props: {
  plot: Box
  ticks: readonly AxisTick[]
  label: string
  theme: FigureTheme
}) {
  const { plot, ticks, label, theme } = props
  const marks = ticks.map(({ at }) => `M${n(plot.left)} ${n(at)}h-4`).join('')
  const middle = n((plot.top + plot.bottom) / 2)
  return (
    <g>
      <path
        d={`M${n(plot.left)} ${n(plot.top)}V${n(plot.bottom)}${marks}`}
        fill="none"
        stroke={theme.axis}
      />
      {ticks.map(({ at, text }) => (
        <text key={text} x={n(plot.left - 9)} y={n(at + 4)} textAnchor="end">
          {text}
        </text>
      ))}
      <text x="12" y={middle} textAnchor="middle" transform={`rotate(-90 12 ${middle})`}>
        {label}
      </text>
    </g>
  )
}
