import { group } from 'd3-array'
import type { AgreementCounts, DatasetRow } from '#shared/schemas/dataset.ts'
import type { MeasuredBy } from '#shared/schemas/precision.ts'
import { LeftOut } from './leftOut.ts'

export type ReadingGroups = { groups: number[][]; counts: AgreementCounts }

/** Readings of one analyte by subject, in order of session; subjects without any are counted out. */
export function readingGroups(
  rows: readonly DatasetRow[],
  analyteKey: string,
  measuredBy: MeasuredBy,
): ReadingGroups {
  const groups: number[][] = []
  const leftOut = new LeftOut()
  let belowLod = 0
  const subjects = [...group(rows, (row) => row.subjectId).values()]
  for (const sessions of subjects) {
    const readings =
      measuredBy === 'sensor'
        ? sessions.flatMap((row) => row.sensorValues[analyteKey] ?? [])
        : sessions.flatMap((row) => {
            const value = row.referenceValues[analyteKey]
            return value === undefined ? [] : [{ value, belowLod: false }]
          })
    if (readings.length === 0) {
      leftOut.add(measuredBy === 'sensor' ? 'noSensorValue' : 'noReferenceValue')
      continue
    }
    groups.push(readings.map((reading) => reading.value))
    belowLod += readings.filter((reading) => reading.belowLod).length
  }
  return {
    groups,
    counts: {
      subjects: subjects.length,
      counted: groups.length,
      pairs: groups.reduce((sum, { length }) => sum + length, 0),
      severalSessions: groups.filter(({ length }) => length > 1).length,
      belowLod,
      leftOut: leftOut.list(),
    },
  }
}
