import type { AgreementLine, DifferencePlotData } from './differencePlotTypes.ts'
import type { FigureTable } from './figureTable.ts'

/** Bias and limits of agreement with their 95 % intervals. */
export function differencePlotTable(props: DifferencePlotData): FigureTable {
  const unit = props.differenceUnit ?? props.unit
  const { bias, lowerLimit, upperLimit, acceptance } = props
  const sloping = [bias, lowerLimit, upperLimit].some(({ slope }) => slope)
  const number = (key: string, label: string) =>
    ({ key, label, unit, format: 'concentration' }) as const
  const row = (line: string, { intercept, slope, interval }: AgreementLine) => ({
    line,
    estimate: intercept,
    slope: slope ?? 0,
    lower: interval?.lower ?? 'not given',
    upper: interval?.upper ?? 'not given',
  })
  const agreed = (line: string, estimate: number) => ({
    line,
    estimate,
    slope: 0,
    lower: 'set beforehand',
    upper: 'set beforehand',
  })
  return {
    caption: 'Bias and limits of agreement',
    columns: [
      { key: 'line', label: 'Line', format: 'text' },
      number('estimate', sloping ? 'At a mean of nought' : 'Estimate'),
      ...(sloping
        ? [{ key: 'slope', label: 'Change per unit of mean', format: 'concentration' as const }]
        : []),
      number('lower', '95 % interval from'),
      number('upper', '95 % interval to'),
    ],
    rows: [
      row('Upper limit', upperLimit),
      row('Bias', bias),
      row('Lower limit', lowerLimit),
      ...(acceptance
        ? [
            agreed('Acceptable up to', acceptance.upper),
            agreed('Acceptable down to', acceptance.lower),
          ]
        : []),
    ],
  }
}

/** Every pair behind the plot. */
export function differencePairsTable(props: DifferencePlotData): FigureTable {
  const { pairs, unit, differenceUnit = unit } = props
  const { meanLabel = 'Mean', differenceLabel = 'Difference' } = props
  const named = pairs.some(({ subject }) => subject)
  return {
    caption: 'Difference and mean of every pair',
    columns: [
      ...(named ? [{ key: 'subject', label: 'Subject', format: 'text' as const }] : []),
      { key: 'mean', label: meanLabel, unit, format: 'concentration' },
      { key: 'difference', label: differenceLabel, unit: differenceUnit, format: 'concentration' },
    ],
    rows: pairs.map(({ subject, mean, difference }) => ({
      subject: subject ?? 'not named',
      mean,
      difference,
    })),
  }
}
