import { range } from 'd3-array'
import type { AgreementLine } from './differencePlotTypes.ts'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import type { ValueAxis } from './valueAxis.ts'

interface Scales {
  plot: Box
  means: ValueAxis
  y: (value: number) => number
}

/** The line over the whole plot; straight on a linear axis, bent on a logarithmic one. */
export function AgreementPath(
  props: Scales & { line: AgreementLine; colour: string; dash?: string; strokeWidth?: number },
) {
  const { line, plot, means, y, colour, dash, strokeWidth } = props
  const { intercept, slope = 0 } = line
  const steps = slope !== 0 && means.kind === 'log' ? 60 : 1
  const path = range(steps + 1).map((step) => {
    const share = step / steps
    const height = y(intercept + slope * means.valueAt(share))
    return `${step === 0 ? 'M' : 'L'}${n(plot.left + share * widthOf(plot))} ${n(height)}`
  })
  return (
    <path
      d={path.join('')}
      fill="none"
      stroke={colour}
      strokeWidth={strokeWidth}
      strokeDasharray={dash}
    />
  )
}

/** The 95 % interval of a level line as a pale band. */
export function AgreementBand({
  line,
  plot,
  y,
  colour,
}: Scales & { line: AgreementLine; colour: string }) {
  if (!line.interval) return null
  const top = y(line.interval.upper)
  return (
    <rect
      x={n(plot.left)}
      y={n(top)}
      width={n(widthOf(plot))}
      height={n(Math.max(0, y(line.interval.lower) - top))}
      fill={colour}
    />
  )
}
