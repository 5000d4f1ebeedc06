import { and, asc, count, eq, exists, gt, inArray, isNotNull, or } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sites } from '#db/schema/sites.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { Allowed } from '#server/changes/targets.ts'
import { codeBegins, ofSites, siteNameColumn } from '#server/features/subjects/subjects.reads.ts'
import type { Reference, ReferenceQuery } from '#shared/schemas/reference.ts'

/**
 * A page of the subjects of whom anything of the reference was entered, of the sites that the reader
 * may see. Class: reference.
 */
export async function listReference(read: Reader, allowed: Allowed, query: ReferenceQuery) {
  const limit = query.limit ?? 50
  const measured = read
    .select({ id: sessions.id })
    .from(sessions)
    .innerJoin(referenceMeasurements, eq(referenceMeasurements.sessionId, sessions.id))
    .where(eq(sessions.subjectId, subjects.id))
  const filter = and(
    eq(subjects.studyId, allowed.studyId),
    ofSites(allowed),
    query.subjectId ? eq(subjects.id, query.subjectId) : undefined,
    query.siteId ? eq(subjects.siteId, query.siteId) : undefined,
    query.code ? codeBegins(query.code) : undefined,
    query.outcome
      ? eq(referenceOutcomes.outcome, query.outcome)
      : or(isNotNull(referenceOutcomes.id), exists(measured)),
  )
  const [totals] = await read
    .select({ total: count() })
    .from(subjects)
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(filter)
  const rows = await read
    .select({
      subjectId: subjects.id,
      subjectCode: subjects.code,
      siteName: siteNameColumn,
      outcome: referenceOutcomes.outcome,
    })
    .from(subjects)
    .leftJoin(sites, eq(sites.id, subjects.siteId))
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(and(filter, query.after === undefined ? undefined : gt(subjects.code, query.after)))
    .orderBy(asc(subjects.code))
    .limit(limit + 1)
  const page = rows.slice(0, limit)
  const measurements = await measurementsOf(
    read,
    page.map((row) => row.subjectId),
  )
  return {
    items: page.map(
      (row): Reference => ({
        ...row,
        measurements: measurements.filter((each) => each.subjectId === row.subjectId),
      }),
    ),
    total: totals?.total ?? 0,
    next: rows.length > limit ? (page.at(-1)?.subjectCode ?? null) : null,
  }
}

async function measurementsOf(read: Reader, subjectIds: string[]) {
  if (subjectIds.length === 0) return []
  return read
    .select({
      subjectId: sessions.subjectId,
      sessionNumber: sessions.number,
      analyteId: referenceMeasurements.analyteId,
      value: referenceMeasurements.value,
    })
    .from(sessions)
    .innerJoin(referenceMeasurements, eq(referenceMeasurements.sessionId, sessions.id))
    .where(inArray(sessions.subjectId, subjectIds))
    .orderBy(asc(sessions.number))
}
