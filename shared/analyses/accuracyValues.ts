import { group } from 'd3-array'
import type { AccuracyCounts, DatasetRow } from '#shared/schemas/dataset.ts'
import type { LeftOutReason, SessionRule } from '#shared/terms/analysis.ts'
import { LeftOut } from './leftOut.ts'
import { oneValue } from './oneValue.ts'

/** Sensor values of one analyte by reference outcome, in its unit. */
export type AccuracyValues = {
  present: number[]
  absent: number[]
  /** Number of the subject that each value came from, where some subject has several; else null. */
  presentSubjects: number[] | null
  absentSubjects: number[] | null
  counts: AccuracyCounts
}

/**
 * Sorts a dataset's sensor values of one analyte by reference outcome and counts every subject once:
 * in, or left out with the first reason that applies. Nothing is imputed; a value below the limit of
 * detection goes in as it was given and is counted.
 */
export function accuracyValues(
  rows: readonly DatasetRow[],
  analyteKey: string,
  rule: SessionRule,
): AccuracyValues {
  const classes = {
    present: { values: [] as number[], subjects: [] as number[], counted: 0 },
    absent: { values: [] as number[], subjects: [] as number[], counted: 0 },
  }
  const leftOut = new LeftOut()
  let severalSessions = 0
  let belowLod = 0
  const subjects = [...group(rows, (row) => row.subjectId).values()]
  for (const [number, sessions] of subjects.entries()) {
    const { outcome } = sessions[0]!
    const readings = sessions.flatMap((row) => row.sensorValues[analyteKey] ?? [])
    const reason = leftOutReason(outcome, readings.length)
    if (reason) {
      leftOut.add(reason)
      continue
    }
    const into = classes[outcome as 'present' | 'absent']
    const used = rule === 'first' ? readings.slice(0, 1) : readings
    const values = used.map((reading) => reading.value)
    const entered = rule === 'every' ? values : [oneValue(values, rule)]
    for (const value of entered) {
      into.values.push(value)
      into.subjects.push(number)
    }
    into.counted += 1
    belowLod += used.filter((reading) => reading.belowLod).length
    if (readings.length > 1) severalSessions += 1
  }
  const { present, absent } = classes
  const clustered = rule === 'every' && severalSessions > 0
  return {
    present: present.values,
    absent: absent.values,
    presentSubjects: clustered ? present.subjects : null,
    absentSubjects: clustered ? absent.subjects : null,
    counts: {
      subjects: subjects.length,
      present: present.counted,
      absent: absent.counted,
      values: present.values.length + absent.values.length,
      severalSessions,
      belowLod,
      leftOut: leftOut.list(),
    },
  }
}

function leftOutReason(outcome: DatasetRow['outcome'], readings: number): LeftOutReason | null {
  if (outcome === null) return 'noOutcome'
  if (outcome === 'notDone' || outcome === 'indeterminate') return outcome
  if (readings > 0) return null
  return outcome === 'present' ? 'noValuePresent' : 'noValueAbsent'
}
