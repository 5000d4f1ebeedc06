import { and, count, countDistinct, eq, isNull, notInArray } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import { importRows } from '#db/schema/importRows.ts'
import { imports } from '#db/schema/imports.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { subjects } from '#db/schema/subjects.ts'
import { currentProtocol } from '#server/features/protocol/protocol.reads.ts'
import type { LockCheck } from '#shared/schemas/lock.ts'
import { IMPORT_STATE_LABELS, type ImportState } from '#shared/terms/importState.ts'
import { formatCount } from '#shared/terms/numbers.ts'

/** States in which nothing more is to be expected of a file. */
const FINISHED_IMPORTS: ImportState[] = ['entered', 'discarded', 'failed']

/**
 * What stands between an earlier-data study and its lock, and what is worth knowing before it:
 * counted anew each time, counts and states alone.
 */
export async function lockChecklist(read: Reader, studyId: string): Promise<LockCheck[]> {
  const subjectCount = await one(
    read.select({ n: count() }).from(subjects).where(eq(subjects.studyId, studyId)),
  )
  return [
    {
      key: 'subjects',
      label: 'Subjects in the study',
      left: subjectCount === 0 ? 1 : 0,
      blocking: true,
      detail: subjectCount === 0 ? 'there are none yet' : formatCount(subjectCount),
    },
    await importsCheck(read, studyId),
    await sensorValuesCheck(read, studyId, subjectCount),
    ...(await outcomeChecks(read, studyId, subjectCount)),
    await referenceValuesCheck(read, studyId),
    await analytesCheck(read, studyId),
    await refusedRowsCheck(read, studyId),
  ]
}

async function importsCheck(read: Reader, studyId: string): Promise<LockCheck> {
  const open = await read
    .select({ number: imports.number, state: imports.state })
    .from(imports)
    .where(and(eq(imports.studyId, studyId), notInArray(imports.state, FINISHED_IMPORTS)))
    .orderBy(imports.number)
  const [first] = open
  const detail =
    first === undefined
      ? 'none'
      : open.length === 1
        ? `no. ${first.number}: ${IMPORT_STATE_LABELS[first.state].toLowerCase()}`
        : `no. ${open.map((each) => each.number).join(', ')}`
  return {
    key: 'imports',
    label: 'Imports neither entered nor discarded',
    left: open.length,
    blocking: true,
    detail,
  }
}

async function sensorValuesCheck(
  read: Reader,
  studyId: string,
  subjectCount: number,
): Promise<LockCheck> {
  const withValue = await one(
    read
      .select({ n: countDistinct(sessions.subjectId) })
      .from(sessionValues)
      .innerJoin(sessions, eq(sessions.id, sessionValues.sessionId))
      .where(eq(sessionValues.studyId, studyId)),
  )
  return informative(
    'sensorValues',
    'Subjects without any sensor value',
    subjectCount - withValue,
    `${formatCount(withValue)} of ${formatCount(subjectCount)} have one`,
  )
}

async function outcomeChecks(
  read: Reader,
  studyId: string,
  subjectCount: number,
): Promise<LockCheck[]> {
  const rows = await read
    .select({ outcome: referenceOutcomes.outcome, n: count() })
    .from(referenceOutcomes)
    .where(eq(referenceOutcomes.studyId, studyId))
    .groupBy(referenceOutcomes.outcome)
  const of = (outcome: string) => rows.find((row) => row.outcome === outcome)?.n ?? 0
  const decided = of('present') + of('absent')
  const indeterminate = of('indeterminate')
  return [
    informative(
      'outcomes',
      'Subjects without a reference outcome',
      subjectCount - decided - indeterminate,
      `${formatCount(decided)} of ${formatCount(subjectCount)} present or absent`,
    ),
    informative(
      'indeterminateOutcomes',
      'Reference outcomes indeterminate',
      indeterminate,
      indeterminate === 0 ? 'none' : 'counted, not analysed',
    ),
  ]
}

async function referenceValuesCheck(read: Reader, studyId: string): Promise<LockCheck> {
  const values = await one(
    read.select({ n: count() }).from(sessionValues).where(eq(sessionValues.studyId, studyId)),
  )
  const alone = await one(
    read
      .select({ n: count() })
      .from(sessionValues)
      .leftJoin(
        referenceMeasurements,
        and(
          eq(referenceMeasurements.sessionId, sessionValues.sessionId),
          eq(referenceMeasurements.analyteId, sessionValues.analyteId),
        ),
      )
      .where(and(eq(sessionValues.studyId, studyId), isNull(referenceMeasurements.id))),
  )
  return informative(
    'referenceValues',
    'Sensor values without a reference analyser value',
    alone,
    `${formatCount(values - alone)} of ${formatCount(values)} paired`,
  )
}

async function analytesCheck(read: Reader, studyId: string): Promise<LockCheck> {
  const { document } = await currentProtocol(read, studyId)
  const measured = await read
    .select({ key: analytes.key, name: analytes.name, n: count(sessionValues.id) })
    .from(analytes)
    .leftJoin(sessionValues, eq(sessionValues.analyteId, analytes.id))
    .where(eq(analytes.studyId, studyId))
    .groupBy(analytes.id)
  const planned = document.biomarkers.map((biomarker) => biomarker.analyteKey)
  const empty = measured.filter((analyte) => planned.includes(analyte.key) && analyte.n === 0)
  return informative(
    'analytes',
    'Analytes of the protocol without any value',
    empty.length,
    empty.length === 0 ? 'none' : empty.map((analyte) => analyte.name).join(', '),
  )
}

async function refusedRowsCheck(read: Reader, studyId: string): Promise<LockCheck> {
  const refused = await one(
    read
      .select({ n: count() })
      .from(importRows)
      .innerJoin(imports, eq(imports.id, importRows.importId))
      .where(
        and(
          eq(imports.studyId, studyId),
          eq(imports.state, 'entered'),
          eq(importRows.fate, 'refused'),
        ),
      ),
  )
  return informative(
    'refusedRows',
    'Rows of imported files that were refused',
    refused,
    refused === 0 ? 'none' : 'not in the data',
  )
}

const informative = (
  key: LockCheck['key'],
  label: string,
  left: number,
  detail: string,
): LockCheck => ({ key, label, left, blocking: false, detail })

async function one(query: PromiseLike<{ n: number }[]>): Promise<number> {
  const [row] = await query
  return row?.n ?? 0
}
