import { max, min, quantileSorted, sort } from 'd3-array'
import type { FigureTable } from './figureTable.ts'

/**
 * Counts and quartiles of the values by reference outcome, and how many the cut-off calls positive.
 * Quartiles interpolate linearly between the two nearest values (type 7 of Hyndman & Fan 1996, Am
 * Stat 50:361).
 */
export function outcomeStripTable(props: {
  label: string
  unit: string
  present: readonly number[]
  absent: readonly number[]
  cutOff?: { value: number; direction: 'higher' | 'lower' }
}): FigureTable {
  const { label, unit, present, absent, cutOff } = props
  const value = (key: string, text: string) =>
    ({ key, label: text, unit, format: 'concentration' }) as const
  return {
    caption: `${label} by reference outcome`,
    columns: [
      { key: 'outcome', label: 'Reference outcome', format: 'text' },
      { key: 'subjects', label: 'Subjects', format: 'count' },
      value('minimum', 'Least'),
      value('lowerQuartile', 'Lower quartile'),
      value('median', 'Median'),
      value('upperQuartile', 'Upper quartile'),
      value('maximum', 'Greatest'),
      ...(cutOff
        ? [{ key: 'positive', label: 'Positive at the cut-off', format: 'count' as const }]
        : []),
    ],
    rows: [summary('Present', present, cutOff), summary('Absent', absent, cutOff)],
  }
}

function summary(
  outcome: string,
  values: readonly number[],
  cutOff: { value: number; direction: 'higher' | 'lower' } | undefined,
) {
  const rising = sort(values)
  const isPositive = (value: number) =>
    cutOff?.direction === 'higher' ? value >= cutOff.value : value <= (cutOff?.value ?? 0)
  return {
    outcome,
    subjects: values.length,
    minimum: min(rising) ?? null,
    lowerQuartile: quantileSorted(rising, 0.25) ?? null,
    median: quantileSorted(rising, 0.5) ?? null,
    upperQuartile: quantileSorted(rising, 0.75) ?? null,
    maximum: max(rising) ?? null,
    ...(cutOff ? { positive: values.filter(isPositive).length } : {}),
  }
}
