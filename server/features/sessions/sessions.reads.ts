import { and, asc, count, eq, gt, inArray, or, type SQL } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { sites } from '#db/schema/sites.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { Allowed } from '#server/changes/targets.ts'
import { codeBegins, ofSites, siteNameColumn } from '#server/features/subjects/subjects.reads.ts'
import { refuseField } from '#shared/errors/AppError.ts'
import type { SessionQuery } from '#shared/schemas/session.ts'

/** A page of the sessions of the sites that the reader may see, with the sensor's values. Class: index. */
export async function listSessions(read: Reader, allowed: Allowed, query: SessionQuery) {
  const limit = query.limit ?? 50
  const filter = and(
    eq(subjects.studyId, allowed.studyId),
    ofSites(allowed),
    query.subjectId ? eq(subjects.id, query.subjectId) : undefined,
    query.siteId ? eq(subjects.siteId, query.siteId) : undefined,
    query.code ? codeBegins(query.code) : undefined,
  )
  const [totals] = await read
    .select({ total: count() })
    .from(sessions)
    .innerJoin(subjects, eq(subjects.id, sessions.subjectId))
    .where(filter)
  const rows = await read
    .select({
      id: sessions.id,
      subjectId: sessions.subjectId,
      subjectCode: subjects.code,
      siteName: siteNameColumn,
      number: sessions.number,
      startedAt: sessions.startedAt,
    })
    .from(subjects)
    .innerJoin(sessions, eq(sessions.subjectId, subjects.id))
    .leftJoin(sites, eq(sites.id, subjects.siteId))
    .where(and(filter, query.after === undefined ? undefined : beyond(query.after)))
    .orderBy(asc(subjects.code), asc(sessions.number))
    .limit(limit + 1)
  const page = rows.slice(0, limit)
  const last = page.at(-1)
  const values = await valuesOf(
    read,
    page.map((row) => row.id),
  )
  return {
    items: page.map((row) => ({
      ...row,
      values: values.filter((value) => value.sessionId === row.id),
    })),
    total: totals?.total ?? 0,
    next: rows.length > limit && last ? `${last.subjectCode} ${last.number}` : null,
  }
}
export type SessionRow = Awaited<ReturnType<typeof listSessions>>['items'][number]

async function valuesOf(read: Reader, sessionIds: string[]) {
  if (sessionIds.length === 0) return []
  return read
    .select({
      sessionId: sessionValues.sessionId,
      analyteId: sessionValues.analyteId,
      value: sessionValues.value,
      belowLod: sessionValues.belowLod,
    })
    .from(sessionValues)
    .where(inArray(sessionValues.sessionId, sessionIds))
}

/** What comes after "N04-7316-W 2". */
function beyond(after: string): SQL | undefined {
  const [, code, number] = /^(\S+) (\d{1,9})$/.exec(after) ?? []
  if (code === undefined) refuseField('after', 'This is not a key of a page.')
  return or(
    gt(subjects.code, code),
    and(eq(subjects.code, code), gt(sessions.number, Number(number))),
  )
}
