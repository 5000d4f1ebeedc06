import { range } from 'd3-array'
import { formatConcentration, formatCount } from '../terms/numbers.ts'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { FigureKey, type KeyEntry, keyHeight } from './FigureKey.tsx'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { PairCloud, pairMarkWords } from './PairCloud.tsx'
import { layOutPairs } from './pairMarks.ts'
import { roundTicks } from './roundTicks.ts'
import type { ReadingPair } from './scatterIdentityTable.ts'
import { type ValueAxis, valueAxis } from './valueAxis.ts'

export interface ScatterIdentityProps extends FigureProps {
  pairs: readonly ReadingPair[]
  /** Both readings are in this unit. */
  unit: string
  /** Default to "Reference" and "Sensor". */
  referenceLabel?: string
  sensorLabel?: string
  /** sensor = intercept + slope × reference; `label` names the method. */
  fit?: { label: string; intercept: number; slope: number }
  /** Both axes; defaults to linear. */
  scale?: ValueAxis['kind']
  title?: string
}

/** Fine enough for a line that ends within half a unit of the frame. */
const STEPS = 400

/** Sensor against reference on two equal axes, with the line on which both would agree. */
export function ScatterIdentity(props: ScatterIdentityProps) {
  const { id, pairs, unit, fit, width = 470 } = props
  const { referenceLabel = 'Reference', sensorLabel = 'Sensor' } = props
  const theme = props.theme ?? figureThemes.light
  const side = width - 80
  const plot: Box = { left: 66, top: 12, right: 66 + side, bottom: 12 + side }
  const axis = valueAxis(
    pairs.flatMap(({ reference, sensor }) => [reference, sensor]),
    props.scale ?? 'linear',
  )
  const x = (value: number) => plot.left + axis.fractionOf(value) * side
  const y = (value: number) => plot.bottom - axis.fractionOf(value) * side
  const marks = layOutPairs(pairs.map((pair) => ({ x: x(pair.reference), y: y(pair.sensor) })))
  const note = pairMarkWords(marks)
  const ticks = axis.ticks(Math.round(side / 80)).map((value) => ({
    at: y(value),
    text: formatConcentration(value),
  }))
  const key = keyEntries(props, theme)
  const keyTop = plot.bottom + (note ? 68 : 52)
  const suffix = `(${unit}${axis.kind === 'log' ? ', log scale' : ''})`
  return (
    <FigureCanvas
      id={id}
      title={props.title ?? `${sensorLabel} against ${referenceLabel.toLowerCase()}`}
      description={describeScatterIdentity(props)}
      width={width}
      height={keyTop + keyHeight(key, side)}
      theme={theme}
    >
      <path
        d={`M${n(plot.left)} ${n(plot.bottom)}L${n(plot.right)} ${n(plot.top)}`}
        stroke={theme.axis}
        strokeWidth="1.4"
        strokeDasharray="2 5"
        fill="none"
      />
      <PairCloud marks={marks} theme={theme} />
      {fit && <FitLine {...{ fit, axis, x, y, theme }} />}
      <BottomAxis
        plot={plot}
        ticks={roundTicks(axis, x, widthOf(plot))}
        label={`${referenceLabel} ${suffix}`}
        theme={theme}
      />
      <LeftAxis plot={plot} ticks={ticks} label={`${sensorLabel} ${suffix}`} theme={theme} />
      {note && (
        <text x={n((plot.left + plot.right) / 2)} y={n(plot.bottom + 58)} textAnchor="middle">
          {note}
        </text>
      )}
      <FigureKey entries={key} left={plot.left} top={keyTop} right={plot.right} theme={theme} />
    </FigureCanvas>
  )
}

export function describeScatterIdentity({ pairs, unit, fit }: ScatterIdentityProps): string {
  const line = fit ? ` ${fit.label}: ${equation(fit)}.` : ''
  return `${formatCount(pairs.length)} pairs in ${unit}, with the line on which both agree.${line}`
}

function keyEntries({ fit }: ScatterIdentityProps, theme: FigureTheme): KeyEntry[] {
  const identity = { label: 'Line of identity', colour: theme.axis, dash: '2 5', strokeWidth: 1.4 }
  if (!fit) return [identity]
  const line = { label: fit.label, value: equation(fit), colour: theme.ink, strokeWidth: 1.6 }
  return [identity, line]
}

function equation({ intercept, slope }: { intercept: number; slope: number }): string {
  const sign = slope < 0 ? '−' : '+'
  return `${formatConcentration(intercept, 3)} ${sign} ${formatConcentration(Math.abs(slope), 3)} × reference`
}

/** The fitted line as far as it runs inside the plot; bent on logarithmic axes. */
function FitLine(props: {
  fit: { intercept: number; slope: number }
  axis: ValueAxis
  x: (value: number) => number
  y: (value: number) => number
  theme: FigureTheme
}) {
  const { fit, axis, x, y, theme } = props
  const path = range(STEPS + 1).flatMap((step) => {
    const reference = axis.valueAt(step / STEPS)
    const sensor = fit.intercept + fit.slope * reference
    const isInside = sensor >= axis.minimum && sensor <= axis.maximum
    return isInside ? [`${n(x(reference))} ${n(y(sensor))}`] : []
  })
  if (path.length < 2) return null
  return <path d={`M${path.join('L')}`} fill="none" stroke={theme.ink} strokeWidth="1.6" />
}
