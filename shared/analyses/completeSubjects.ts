import type { AccuracyCounts, DatasetRow } from '#shared/schemas/dataset.ts'
import type { LeftOutReason, SessionRule } from '#shared/terms/analysis.ts'
import { LeftOut } from './leftOut.ts'
import { type SubjectValues, subjectValues } from './subjectValues.ts'

/** A subject with an outcome and a valid value of every analyte asked for. */
export type CompleteSubject = {
  subject: SubjectValues['subject']
  present: boolean
  values: number[]
}

/**
 * The subjects who have an outcome and a valid value of every analyte, and a count of all the others
 * with the first reason that applies.
 */
export function completeSubjects(
  rows: readonly DatasetRow[],
  analyteKeys: readonly string[],
  rule: Exclude<SessionRule, 'every'>,
): { subjects: CompleteSubject[]; counts: AccuracyCounts } {
  const leftOut = new LeftOut()
  const subjects: CompleteSubject[] = []
  let severalSessions = 0
  let belowLod = 0
  const all = subjectValues(rows, analyteKeys, rule)
  for (const each of all) {
    const values = each.values.filter((value) => value !== null)
    const reason = leftOutReason(each.outcome, values.length, analyteKeys.length)
    if (reason) {
      leftOut.add(reason)
      continue
    }
    subjects.push({ subject: each.subject, present: each.outcome === 'present', values })
    belowLod += each.belowLod
    if (each.sessions > 1) severalSessions += 1
  }
  const present = subjects.filter((each) => each.present).length
  const counts = {
    subjects: all.length,
    present,
    absent: subjects.length - present,
    values: subjects.length,
    severalSessions,
    belowLod,
    leftOut: leftOut.list(),
  }
  return { subjects, counts }
}

function leftOutReason(
  outcome: DatasetRow['outcome'],
  values: number,
  wanted: number,
): LeftOutReason | null {
  if (outcome === null) return 'noOutcome'
  if (outcome === 'notDone' || outcome === 'indeterminate') return outcome
  if (values === wanted) return null
  if (values === 0) return outcome === 'present' ? 'noValuePresent' : 'noValueAbsent'
  return outcome === 'present' ? 'incompletePresent' : 'incompleteAbsent'
}
