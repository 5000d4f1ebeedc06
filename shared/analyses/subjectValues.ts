import { group } from 'd3-array'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import type { SessionRule } from '#shared/terms/analysis.ts'
import { oneValue } from './oneValue.ts'

/** One subject of a dataset with one value of each analyte asked for, in its unit; null without a valid one. */
export type SubjectValues = {
  subject: Pick<DatasetRow, 'site' | 'sex' | 'ageBand' | 'covariates'>
  outcome: DatasetRow['outcome']
  values: (number | null)[]
  /** Valid sessions of the analyte that has most. */
  sessions: number
  belowLod: number
}

const ONE_EACH =
  'Some subjects have several sessions, and this needs one value for each subject. Choose the first session, or the mean or median of each subject.'

/**
 * Every subject once, in the order of the dataset, with one value of each analyte.
 * @throws StatisticsError 'out-of-range' where the rule is `every` and a subject has several sessions
 */
export function subjectValues(
  rows: readonly DatasetRow[],
  analyteKeys: readonly string[],
  rule: SessionRule,
): SubjectValues[] {
  return [...group(rows, (row) => row.subjectId).values()].map((sessions) => {
    const readings = analyteKeys.map((key) =>
      sessions.flatMap((row) => row.sensorValues[key] ?? []),
    )
    const most = Math.max(0, ...readings.map((each) => each.length))
    if (rule === 'every' && most > 1) throw new StatisticsError('out-of-range', ONE_EACH)
    const used = readings.map((each) => (rule === 'first' ? each.slice(0, 1) : each))
    return {
      subject: sessions[0]!,
      outcome: sessions[0]!.outcome,
      values: used.map((each) => oneOf(each, rule)),
      sessions: most,
      belowLod: used.flat().filter((reading) => reading.belowLod).length,
    }
  })
}

function oneOf(readings: readonly { value: number }[], rule: SessionRule): number | null {
  if (readings.length === 0) return null
  return oneValue(
    readings.map((reading) => reading.value),
    rule === 'every' ? 'first' : rule,
  )
}
