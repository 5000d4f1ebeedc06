import { and, eq, isNotNull } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { ImportEntry } from '#shared/schemas/import.ts'

export type StoredSession = {
  id: string
  sensorValues: ImportEntry['sensorValues']
  referenceValues: ImportEntry['referenceValues']
}

/** A subject that came in by an earlier import, with all that a row could say about it. */
export type StoredSubject = Pick<
  ImportEntry,
  'siteId' | 'sex' | 'ageBand' | 'outcome' | 'covariates'
> & { id: string; code: string; sessions: Map<number, StoredSession> }

/** The imported subjects of a study by the keyed digest of their word. */
export async function storedSubjects(
  read: Reader,
  studyId: string,
): Promise<Map<string, StoredSubject>> {
  const rows = await read
    .select({
      id: subjects.id,
      code: subjects.code,
      digest: subjects.sourceDigest,
      siteId: subjects.siteId,
      sex: subjects.sex,
      ageBand: subjects.ageBand,
      covariates: subjects.covariates,
      outcome: referenceOutcomes.outcome,
    })
    .from(subjects)
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(and(eq(subjects.studyId, studyId), isNotNull(subjects.sourceDigest)))
  const stored = new Map<string, StoredSubject>()
  const byId = new Map<string, StoredSubject>()
  for (const { digest, ...row } of rows) {
    const subject = { ...row, sessions: new Map<number, StoredSession>() }
    stored.set(digest!, subject)
    byId.set(row.id, subject)
  }
  if (stored.size > 0) await addSessions(read, studyId, byId)
  return stored
}

async function addSessions(
  read: Reader,
  studyId: string,
  byId: ReadonlyMap<string, StoredSubject>,
): Promise<void> {
  const bySession = new Map<string, StoredSession>()
  const sessionRows = await read
    .select({ id: sessions.id, subjectId: sessions.subjectId, number: sessions.number })
    .from(sessions)
    .where(eq(sessions.studyId, studyId))
  for (const { id, subjectId, number } of sessionRows) {
    const session: StoredSession = { id, sensorValues: {}, referenceValues: {} }
    byId.get(subjectId)?.sessions.set(number, session)
    bySession.set(id, session)
  }
  const values = await read
    .select({
      sessionId: sessionValues.sessionId,
      key: analytes.key,
      value: sessionValues.value,
      belowLod: sessionValues.belowLod,
    })
    .from(sessionValues)
    .innerJoin(analytes, eq(analytes.id, sessionValues.analyteId))
    .where(eq(sessionValues.studyId, studyId))
  for (const { sessionId, key, value, belowLod } of values) {
    const session = bySession.get(sessionId)
    if (session) session.sensorValues[key] = { value, belowLod }
  }
  const measurements = await read
    .select({
      sessionId: referenceMeasurements.sessionId,
      key: analytes.key,
      value: referenceMeasurements.value,
    })
    .from(referenceMeasurements)
    .innerJoin(analytes, eq(analytes.id, referenceMeasurements.analyteId))
    .where(eq(referenceMeasurements.studyId, studyId))
  for (const { sessionId, key, value } of measurements) {
    const session = bySession.get(sessionId)
    if (session) session.referenceValues[key] = value
  }
}
