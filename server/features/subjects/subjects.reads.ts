import {
  and,
  asc,
  count,
  desc,
  eq,
  gt,
  inArray,
  isNull,
  like,
  lt,
  notExists,
  or,
  type SQL,
  sql,
} from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { imports } from '#db/schema/imports.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sites } from '#db/schema/sites.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { Allowed } from '#server/changes/targets.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { SubjectQuery } from '#shared/schemas/subject.ts'

/**
 * Every subject has a site. Joined from the left all the same: an inner join lets the database begin
 * with the sites and sort all subjects for one page (0.45 s instead of 5 ms at 18,000).
 */
export const siteNameColumn = sql<string>`${sites.name}`

const columns = {
  id: subjects.id,
  code: subjects.code,
  siteId: subjects.siteId,
  siteName: siteNameColumn,
  sex: subjects.sex,
  ageBand: subjects.ageBand,
  enrolledAt: subjects.enrolledAt,
  covariates: subjects.covariates,
  importNumber: imports.number,
  version: subjects.version,
  sessionCount:
    sql<number>`(select count(*) from ${sessions} where ${sessions.subjectId} = ${subjects.id})`.mapWith(
      Number,
    ),
  outcomeDecided:
    sql<boolean>`(${referenceOutcomes.outcome} is not null and ${referenceOutcomes.outcome} <> 'notDone')`.mapWith(
      Boolean,
    ),
}
export type SubjectRow = Awaited<ReturnType<typeof getSubject>>

/** One subject. @throws AppError not-found */
export async function getSubject(read: Reader, subjectId: string) {
  const [row] = await read
    .select(columns)
    .from(subjects)
    .leftJoin(sites, eq(sites.id, subjects.siteId))
    .leftJoin(imports, eq(imports.id, subjects.importId))
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(eq(subjects.id, subjectId))
  if (!row) throw new AppError('not-found')
  return row
}

/** A page of subjects of the sites that the reader may see, by key. */
export async function listSubjects(read: Reader, allowed: Allowed, query: SubjectQuery) {
  const limit = query.limit ?? 50
  const order = query.order ?? 'code'
  const backwards = query.descending === 'true'
  const filter = and(
    eq(subjects.studyId, allowed.studyId),
    ofSites(allowed),
    query.siteId ? eq(subjects.siteId, query.siteId) : undefined,
    query.sex ? eq(subjects.sex, query.sex) : undefined,
    query.code ? codeBegins(query.code) : undefined,
    query.needs ? lacking(read, query.needs) : undefined,
  )
  const [totals] = await read
    .select({ total: count() })
    .from(subjects)
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(filter)
  const direction = backwards ? desc : asc
  const rows = await read
    .select(columns)
    .from(subjects)
    .leftJoin(sites, eq(sites.id, subjects.siteId))
    .leftJoin(imports, eq(imports.id, subjects.importId))
    .leftJoin(referenceOutcomes, eq(referenceOutcomes.subjectId, subjects.id))
    .where(and(filter, query.after ? beyond(order, query.after, backwards) : undefined))
    .orderBy(direction(subjects[order]), direction(subjects.code))
    .limit(limit + 1)
  const items = rows.slice(0, limit)
  const last = items.at(-1)
  return {
    items,
    total: totals?.total ?? 0,
    next: rows.length > limit && last ? keyOf(order, last) : null,
  }
}

/** Rows of the sites that a permit covers. */
export function ofSites(allowed: Allowed): SQL | undefined {
  return allowed.sites === 'all' ? undefined : inArray(subjects.siteId, [...allowed.sites])
}

/** Subjects whose code begins as typed; per cent and underscore stand for themselves. */
export const codeBegins = (typed: string): SQL =>
  like(subjects.code, `${typed.toUpperCase().replace(/[\\%_]/g, '\\$&')}%`)

/** Subjects without a session, or without a decided outcome. */
function lacking(read: Reader, need: NonNullable<SubjectQuery['needs']>): SQL | undefined {
  if (need === 'outcome')
    return or(isNull(referenceOutcomes.id), eq(referenceOutcomes.outcome, 'notDone'))
  return notExists(
    read.select({ id: sessions.id }).from(sessions).where(eq(sessions.subjectId, subjects.id)),
  )
}

const keyOf = (order: 'code' | 'enrolledAt', row: { code: string; enrolledAt: Date }) =>
  order === 'code' ? row.code : `${row.enrolledAt.toISOString()} ${row.code}`

function beyond(order: 'code' | 'enrolledAt', after: string, backwards: boolean): SQL | undefined {
  const past = backwards ? lt : gt
  if (order === 'code') return past(subjects.code, after)
  const [instant = '', code = ''] = after.split(' ')
  const at = new Date(instant)
  if (Number.isNaN(at.getTime()))
    throw new AppError('invalid', { fields: { after: 'This is not a key of a page.' } })
  return or(
    past(subjects.enrolledAt, at),
    and(eq(subjects.enrolledAt, at), past(subjects.code, code)),
  )
}
