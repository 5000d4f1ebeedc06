import { formatConcentration, formatInterval } from '../terms/numbers.ts'
import { AgreementBand, AgreementPath } from './AgreementLines.tsx'
import type { AgreementLine, DifferencePlotData } from './differencePlotTypes.ts'
import { EdgeLabels } from './EdgeLabels.tsx'
import { BottomAxis, LeftAxis } from './FigureAxes.tsx'
import { FigureCanvas, type FigureProps } from './FigureCanvas.tsx'
import { FigureKey, type KeyEntry, keyHeight } from './FigureKey.tsx'
import { type Box, figureNumber as n, widthOf } from './figureGeometry.ts'
import { type FigureTheme, figureThemes } from './figureTheme.ts'
import { PairCloud, pairMarkWords } from './PairCloud.tsx'
import { layOutPairs } from './pairMarks.ts'
import { roundTicks } from './roundTicks.ts'
import { type ValueAxis, valueAxis } from './valueAxis.ts'

export interface DifferencePlotProps extends FigureProps, DifferencePlotData {
  /** Where there is no difference: 0, or 1 for ratios. */
  noDifference?: number
  /** Defaults to linear. */
  meanScale?: ValueAxis['kind']
  title?: string
}

/** Narrower than this the lines are named under the plot instead of beside it. */
const NARROW = 560
const GUTTER = 158

/** Difference against mean after Bland and Altman, with bias, limits and their intervals. */
export function DifferencePlot(props: DifferencePlotProps) {
  const { id, pairs, bias, lowerLimit, upperLimit, width = 680 } = props
  const { meanLabel = 'Mean of sensor and reference', differenceLabel = 'Sensor − reference' } =
    props
  const theme = props.theme ?? figureThemes.light
  const beside = width >= NARROW
  const plot: Box = {
    left: 66,
    top: 12,
    right: width - (beside ? GUTTER : 14),
    bottom: 12 + (beside ? 330 : 280),
  }
  const means = valueAxis(
    pairs.map(({ mean }) => mean),
    props.meanScale ?? 'linear',
  )
  const differences = valueAxis(heights(props, means), 'linear')
  const x = (value: number) => plot.left + means.fractionOf(value) * widthOf(plot)
  const y = (value: number) =>
    plot.bottom - differences.fractionOf(value) * (plot.bottom - plot.top)
  const marks = layOutPairs(pairs.map((pair) => ({ x: x(pair.mean), y: y(pair.difference) })))
  const note = pairMarkWords(marks)
  const entries = namedLines(props, theme)
  const scales = { plot, means, y }
  const keyTop = plot.bottom + (note ? 68 : 52)
  return (
    <FigureCanvas
      id={id}
      title={props.title ?? 'Difference against mean'}
      description={describeDifferencePlot(props)}
      width={width}
      height={beside ? keyTop : keyTop + keyHeight(entries, widthOf(plot))}
      theme={theme}
    >
      {[upperLimit, bias, lowerLimit].map((line) => (
        <AgreementBand key={line.intercept} line={line} {...scales} colour={theme.seriesBand[0]} />
      ))}
      <path
        d={`M${n(plot.left)} ${n(y(props.noDifference ?? 0))}H${n(plot.right)}`}
        stroke={theme.axis}
        fill="none"
      />
      <PairCloud marks={marks} theme={theme} />
      {entries.map(({ line, colour, dash, strokeWidth, label }) => (
        <AgreementPath key={label} {...{ line, colour, dash, strokeWidth }} {...scales} />
      ))}
      <BottomAxis
        plot={plot}
        ticks={roundTicks(means, x, widthOf(plot))}
        label={inUnit(meanLabel, props.unit, means.kind)}
        theme={theme}
      />
      <LeftAxis
        plot={plot}
        ticks={differences
          .ticks(6)
          .map((value) => ({ at: y(value), text: formatConcentration(value) }))}
        label={inUnit(differenceLabel, props.differenceUnit ?? props.unit)}
        theme={theme}
      />
      {note && (
        <text x={n((plot.left + plot.right) / 2)} y={n(plot.bottom + 58)} textAnchor="middle">
          {note}
        </text>
      )}
      {beside ? (
        <EdgeLabels
          labels={entries.map((entry) => ({
            ...entry,
            at: y(heightAt(entry.line, means.maximum)),
          }))}
          plot={plot}
          theme={theme}
        />
      ) : (
        <FigureKey
          entries={entries}
          left={plot.left}
          top={keyTop}
          right={plot.right}
          theme={theme}
        />
      )}
    </FigureCanvas>
  )
}

export function describeDifferencePlot(props: DifferencePlotData): string {
  const unit = props.differenceUnit ?? props.unit
  const lines = namedLines(props, figureThemes.light).map(({ label, value }) =>
    value ? `${label}: ${unit ? `${value} ${unit}` : value}.` : `${label}.`,
  )
  return [`${props.pairs.length} pairs.`, ...lines].join(' ')
}

/** "Mean (ppb, log scale)"; no brackets where nothing stands in them. */
function inUnit(label: string, unit: string, kind: ValueAxis['kind'] = 'linear'): string {
  const parts = [unit, kind === 'log' ? 'log scale' : ''].filter((part) => part !== '')
  return parts.length === 0 ? label : `${label} (${parts.join(', ')})`
}

interface NamedLine extends KeyEntry {
  line: AgreementLine
}

const BIAS_AND_LIMITS = { upper: 'Upper limit', middle: 'Bias', lower: 'Lower limit' }

/** The lines of the plot from the top down, as they are drawn and named. */
function namedLines(props: DifferencePlotData, theme: FigureTheme): NamedLine[] {
  const { bias, lowerLimit, upperLimit, acceptance } = props
  const limit = { colour: theme.ink, dash: '7 4', strokeWidth: 1.5 }
  const agreed = { colour: theme.series[1], dash: '12 3 2 3', strokeWidth: 1.6 }
  const names = props.lineNames ?? BIAS_AND_LIMITS
  const lines: NamedLine[] = [
    { label: names.upper, value: words(upperLimit), line: upperLimit, ...limit },
    { label: names.middle, value: words(bias), line: bias, colour: theme.ink, strokeWidth: 1.8 },
    { label: names.lower, value: words(lowerLimit), line: lowerLimit, ...limit },
  ]
  if (!acceptance) return lines
  const accepted = (label: string, intercept: number): NamedLine => ({
    label,
    value: formatConcentration(intercept, 3),
    line: { intercept },
    ...agreed,
  })
  return [
    accepted('Acceptable up to', acceptance.upper),
    ...lines,
    accepted('Acceptable down to', acceptance.lower),
  ]
}

/** "12.4 (8.1 to 16.7)" for a level line, the equation for a sloping one. */
function words({ intercept, slope, interval }: AgreementLine): string {
  const start = formatConcentration(intercept, 3)
  if (slope)
    return `${start} ${slope < 0 ? '−' : '+'} ${formatConcentration(Math.abs(slope), 3)} × mean`
  if (!interval) return start
  const decimals = start.split('.')[1]?.length ?? 0
  return `${start} (${formatInterval(interval.lower, interval.upper, decimals)})`
}

/** Every height that must fit the plot. */
function heights(props: DifferencePlotProps, means: ValueAxis): number[] {
  const lines = [props.bias, props.lowerLimit, props.upperLimit]
  return [
    ...props.pairs.map(({ difference }) => difference),
    ...lines.flatMap((line) => [heightAt(line, means.minimum), heightAt(line, means.maximum)]),
    ...lines.flatMap(({ interval }) => (interval ? [interval.lower, interval.upper] : [])),
    ...(props.acceptance ? [props.acceptance.lower, props.acceptance.upper] : []),
    props.noDifference ?? 0,
  ]
}

function heightAt({ intercept, slope = 0 }: AgreementLine, mean: number): number {
  return intercept + slope * mean
}
