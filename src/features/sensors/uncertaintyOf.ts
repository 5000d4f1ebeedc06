import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import {
  type ExpandedUncertainty,
  expandedUncertainty,
} from '#shared/statistics/sensor/expandedUncertainty.ts'
import type { Entry, EntryValues } from '../../forms/entries.ts'
import { readNumber } from '../../forms/readNumber.ts'

const notNegative = (value: number) => (value >= 0 ? null : '0 or more.')
const positive = (value: number) => (value > 0 ? null : 'Above 0, such as 2.')

const needed = <T extends Omit<Entry, 'optional'>>(entry: T) => ({
  ...entry,
  optional: false as const,
})
const optional = <T extends Omit<Entry, 'optional'>>(entry: T) => ({
  ...entry,
  optional: true as const,
})

/** What a session's uncertainty is made of. */
export const BUDGET_ENTRIES = {
  calibrationPercent: needed({
    label: 'Calibration, expanded',
    unit: '%',
    hint: 'From the certificate, of the value',
    start: '5',
    refuse: notNegative,
  }),
  calibrationCoverage: needed({
    label: 'Its coverage factor',
    hint: 'k on the certificate',
    start: '2',
    refuse: positive,
  }),
  resolution: needed({
    label: 'Step of the display',
    hint: 'In the unit of the values',
    start: '1',
    refuse: notNegative,
  }),
  driftPercent: needed({
    label: 'Drift since calibration',
    unit: '%',
    hint: 'Largest, either way',
    start: '1',
    refuse: notNegative,
  }),
  ambientMean: optional({ label: 'Room air', hint: 'Taken off the mean', start: '' }),
  ambientUncertainty: optional({
    label: 'Its standard uncertainty',
    hint: 'In the unit of the values',
    start: '',
    refuse: notNegative,
  }),
  coverage: needed({
    label: 'Coverage factor',
    hint: 'Of the answer; 2 covers about 95 %',
    start: '2',
    refuse: positive,
  }),
}
export type BudgetValues = EntryValues<typeof BUDGET_ENTRIES>

/** Values of the exhalations as typed: apart by spaces, semicolons or lines. */
export function readExhalations(
  text: string,
): { values: number[]; problem: null } | { values: null; problem: string } {
  const words = text.split(/(?:[\s;]|,(?=\s|$))+/).filter((word) => word !== '')
  if (words.length === 0) return { values: null, problem: 'Give the values of one session.' }
  const values: number[] = []
  for (const word of words) {
    const { value, problem } = readNumber(word)
    if (problem) return { values: null, problem }
    values.push(value!)
  }
  return { values, problem: null }
}

/** The budget worked out, or the sentence for the values when they are too few. */
export function uncertaintyOf(
  exhalations: readonly number[],
  values: BudgetValues,
): { found: ExpandedUncertainty; problem: null } | { found: null; problem: string } {
  const { ambientMean, ambientUncertainty, ...budget } = values
  const ambient =
    ambientMean === undefined && ambientUncertainty === undefined
      ? undefined
      : { mean: ambientMean ?? 0, standardUncertainty: ambientUncertainty ?? 0 }
  try {
    return { found: expandedUncertainty(exhalations, { ...budget, ambient }), problem: null }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    return { found: null, problem: error.message }
  }
}
