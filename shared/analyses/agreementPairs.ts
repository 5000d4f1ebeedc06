import { group } from 'd3-array'
import type { AgreementCounts, DatasetRow } from '#shared/schemas/dataset.ts'
import type { LeftOutReason, SessionRule } from '#shared/terms/analysis.ts'
import { LeftOut } from './leftOut.ts'
import { oneValue } from './oneValue.ts'

/** Sensor and reference analyser value of one analyte, pair by pair, both in its unit. */
export type AgreementPairs = {
  sensor: number[]
  reference: number[]
  /** Code of the subject that each pair came from. */
  subjects: string[]
  counts: AgreementCounts
}

/**
 * Pairs the sensor's and the reference analyser's value of one analyte within each session. Where a
 * subject has several such sessions the rule chooses: the first, or the mean or median of each side.
 */
export function agreementPairs(
  rows: readonly DatasetRow[],
  analyteKey: string,
  rule: SessionRule,
): AgreementPairs {
  const pairs = { sensor: [] as number[], reference: [] as number[], subjects: [] as string[] }
  const leftOut = new LeftOut()
  let counted = 0
  let severalSessions = 0
  let belowLod = 0
  const subjects = [...group(rows, (row) => row.subjectId).values()]
  for (const sessions of subjects) {
    const both = sessions.flatMap((row) => {
      const sensor = row.sensorValues[analyteKey]
      const reference = row.referenceValues[analyteKey]
      return sensor && reference !== undefined ? [{ sensor, reference }] : []
    })
    if (both.length === 0) {
      leftOut.add(leftOutReason(sessions, analyteKey))
      continue
    }
    const used = rule === 'first' ? both.slice(0, 1) : both
    const sensor = used.map((pair) => pair.sensor.value)
    const reference = used.map((pair) => pair.reference)
    if (rule === 'every') {
      pairs.sensor.push(...sensor)
      pairs.reference.push(...reference)
    } else {
      pairs.sensor.push(oneValue(sensor, rule))
      pairs.reference.push(oneValue(reference, rule))
    }
    const { subject } = sessions[0]!
    pairs.subjects.push(...(rule === 'every' ? used.map(() => subject) : [subject]))
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

function leftOutReason(sessions: readonly DatasetRow[], analyteKey: string): LeftOutReason {
  const sensor = sessions.some((row) => row.sensorValues[analyteKey] !== undefined)
  const reference = sessions.some((row) => row.referenceValues[analyteKey] !== undefined)
  if (sensor && reference) return 'notInOneSession'
  if (sensor) return 'noReferenceValue'
  return reference ? 'noSensorValue' : 'neitherValue'
}
