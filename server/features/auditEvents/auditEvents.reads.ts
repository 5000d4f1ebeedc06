import { and, count, desc, eq, gte, inArray, like, lt, or, type SQL } from 'drizzle-orm'
import { alias } from 'drizzle-orm/mysql-core'
import type { Reader } from '#db/client.ts'
import { auditEvents } from '#db/schema/auditEvents.ts'
import { auditValues } from '#db/schema/auditValues.ts'
import { sites } from '#db/schema/sites.ts'
import type { Allowed } from '#server/changes/targets.ts'
import type { AuditEventQuery } from '#shared/schemas/auditEvent.ts'

const DAY_MS = 86_400_000

const recordSites = alias(sites, 'site_of_record')
const personSites = alias(sites, 'site_of_person')

const columns = {
  position: auditEvents.position,
  event: auditEvents.event,
  recordType: auditEvents.recordType,
  recordLabel: auditEvents.recordLabel,
  recordSiteId: auditEvents.recordSiteId,
  siteName: recordSites.name,
  personName: auditEvents.personName,
  role: auditEvents.role,
  duty: auditEvents.duty,
  personSiteName: personSites.name,
  reason: auditEvents.reason,
  informationClass: auditEvents.informationClass,
  collectedAt: auditEvents.collectedAt,
  enteredAt: auditEvents.enteredAt,
  receivedAt: auditEvents.receivedAt,
  localOffset: auditEvents.localOffset,
  requestId: auditEvents.requestId,
  hash: auditEvents.hash,
}

export type AuditValueRow = typeof auditValues.$inferSelect
export type AuditEventRow = Awaited<ReturnType<typeof eventRows>>[number] & {
  values: AuditValueRow[]
}

/** A page of a study's trail, the newest first, of the sites that the reader's permit covers. */
export async function listAuditEvents(read: Reader, allowed: Allowed, query: AuditEventQuery) {
  const limit = query.limit ?? 50
  const filter = and(...filtersOf(allowed, query))
  const [totals] = await read.select({ total: count() }).from(auditEvents).where(filter)
  const rows = await eventRows(
    read,
    and(filter, query.after ? lt(auditEvents.position, Number(query.after)) : undefined),
    limit + 1,
  )
  const items = rows.slice(0, limit)
  const values = await valuesOf(
    read,
    allowed.studyId,
    items.map((row) => row.position),
  )
  return {
    items: items.map((row): AuditEventRow => ({ ...row, values: values.get(row.position) ?? [] })),
    total: totals?.total ?? 0,
    next: rows.length > limit ? String(items.at(-1)!.position) : null,
  }
}

const eventRows = (read: Reader, condition: SQL | undefined, limit: number) =>
  read
    .select(columns)
    .from(auditEvents)
    .leftJoin(recordSites, eq(recordSites.id, auditEvents.recordSiteId))
    .leftJoin(personSites, eq(personSites.id, auditEvents.siteId))
    .where(condition)
    .orderBy(desc(auditEvents.position))
    .limit(limit)

function filtersOf(allowed: Allowed, query: AuditEventQuery): (SQL | undefined)[] {
  const { sites: covered } = allowed
  return [
    eq(auditEvents.chainId, allowed.studyId),
    covered === 'all' ? undefined : inArray(auditEvents.recordSiteId, [...covered]),
    query.event ? eq(auditEvents.event, query.event) : undefined,
    query.person ? like(auditEvents.personName, contains(query.person)) : undefined,
    query.record
      ? or(
          like(auditEvents.recordLabel, contains(query.record)),
          eq(auditEvents.recordType, query.record),
        )
      : undefined,
    query.from ? gte(auditEvents.receivedAt, new Date(`${query.from}T00:00:00Z`)) : undefined,
    query.to ? lt(auditEvents.receivedAt, dayAfter(query.to)) : undefined,
  ]
}

/** Per cent and underscore stand for themselves. */
const contains = (text: string) => `%${text.replace(/[\\%_]/g, '\\$&')}%`

const dayAfter = (day: string) => new Date(Date.parse(`${day}T00:00:00Z`) + DAY_MS)

async function valuesOf(
  read: Reader,
  chainId: string,
  positions: number[],
): Promise<Map<number, AuditValueRow[]>> {
  const byPosition = new Map<number, AuditValueRow[]>()
  if (positions.length === 0) return byPosition
  const rows = await read
    .select()
    .from(auditValues)
    .where(and(eq(auditValues.chainId, chainId), inArray(auditValues.position, positions)))
    .orderBy(auditValues.position, auditValues.ordinal)
  for (const row of rows)
    byPosition.set(row.position, [...(byPosition.get(row.position) ?? []), row])
  return byPosition
}
