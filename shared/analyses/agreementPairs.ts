import { group } from 'd3-array'
import type { AgreementCounts, DatasetRow } from '#shared/schemas/dataset.ts'
import type { LeftOutReason, SessionRule } from '#shared/terms/analysis.ts'
import { LeftOut } from './leftOut.ts'
import { oneValue } from './oneValue.ts'

/** Sensor value of one analyte and reference analyser value of the same or another, pair by pair. */
export type AgreementPairs = {
  sensor: number[]
  reference: number[]
  /** Code and key of the subject that each pair came from. */
  subjects: string[]
  subjectIds: string[]
  counts: AgreementCounts
}

/**
 * Pairs the sensor's and the reference analyser's value within each session. Where a subject has
 * several such sessions the rule chooses: the first, the mean or median of each side, or all of them.
 * @param referenceKey analyte of the reference values, the sensor's unless given
 */
export function agreementPairs(
  rows: readonly DatasetRow[],
  analyteKey: string,
  rule: SessionRule,
  referenceKey: string = analyteKey,
): AgreementPairs {
  const pairs = {
    sensor: [] as number[],
    reference: [] as number[],
    subjects: [] as string[],
    subjectIds: [] as string[],
  }
  const leftOut = new LeftOut()
  let counted = 0
  let severalSessions = 0
  let belowLod = 0
  const subjects = [...group(rows, (row) => row.subjectId).values()]
  for (const sessions of subjects) {
    const both = sessions.flatMap((row) => {
      const sensor = row.sensorValues[analyteKey]
      const reference = row.referenceValues[referenceKey]
      return sensor && reference !== undefined ? [{ sensor, reference }] : []
    })
    if (both.length === 0) {
      leftOut.add(leftOutReason(sessions, analyteKey, referenceKey))
      continue
    }
    const used = rule === 'first' ? both.slice(0, 1) : both
    const sensor = used.map((pair) => pair.sensor.value)
    const reference = used.map((pair) => pair.reference)
    const entered = rule === 'every' ? used.length : 1
    pairs.sensor.push(...(rule === 'every' ? sensor : [oneValue(sensor, rule)]))
    pairs.reference.push(...(rule === 'every' ? reference : [oneValue(reference, rule)]))
    const { subject, subjectId } = sessions[0]!
    for (let pair = 0; pair < entered; pair += 1) {
      pairs.subjects.push(subject)
      pairs.subjectIds.push(subjectId)
    }
    counted += 1
    belowLod += used.filter((pair) => pair.sensor.belowLod).length
    if (both.length > 1) severalSessions += 1
  }
  return {
    ...pairs,
    counts: {
      subjects: subjects.length,
      counted,
      pairs: pairs.sensor.length,
      severalSessions,
      belowLod,
      leftOut: leftOut.list(),
    },
  }
}

function leftOutReason(
  sessions: readonly DatasetRow[],
  analyteKey: string,
  referenceKey: string,
): LeftOutReason {
  const sensor = sessions.some((row) => row.sensorValues[analyteKey] !== undefined)
  const reference = sessions.some((row) => row.referenceValues[referenceKey] !== undefined)
  if (sensor && reference) return 'notInOneSession'
  if (sensor) return 'noReferenceValue'
  return reference ? 'noSensorValue' : 'neitherValue'
}
