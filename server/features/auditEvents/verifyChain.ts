import { setImmediate as nextTurn } from 'node:timers/promises'
import { and, asc, eq, gt, lte, max } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { auditEvents } from '#db/schema/auditEvents.ts'
import { auditValues } from '#db/schema/auditValues.ts'
import { datasets } from '#db/schema/datasets.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { ChainStretch, ChainVerdict } from '#shared/schemas/auditEvent.ts'
import { type Break, breakOfEvent } from './breakOfEvent.ts'

/** Small enough that other requests get their turn between two pages. */
const EVENTS_AT_A_TIME = 500
const NO_HASH_YET = '0'.repeat(64)

/** What the walk compares with, as read at its beginning. */
type Head = { count: number; headHash: string; lastPosition: number; anchors: Map<number, string> }

/**
 * Walks a chain, or a stretch of it, from the oldest event on, and names the first place that does
 * not hold: a gap, a link that does not meet, an event or a value that is not what was hashed, a
 * hash that an earlier dataset states otherwise, an end that is not the head that the chain records.
 */
export async function verifyChain(
  read: Reader,
  chainId: string,
  { after = 0, most }: ChainStretch = {},
): Promise<ChainVerdict> {
  const head = await readHead(read, chainId)
  const from = Math.min(after, head.count)
  const to = Math.min(head.count, most === undefined ? head.count : from + most)
  let walked: Walked = {
    position: from,
    hash: from === 0 ? NO_HASH_YET : await hashAt(read, chainId, from),
    redacted: 0,
    firstBreak: null,
  }
  while (!walked.firstBreak && walked.position < to) {
    walked = await walkPage(read, chainId, walked, to, head)
    await nextTurn()
  }
  const firstBreak =
    walked.firstBreak ?? (walked.position >= head.count ? endBreak(walked, head) : null)
  return {
    intact: firstBreak === null,
    count: head.count,
    headHash: head.headHash,
    checkedTo: walked.position,
    redacted: walked.redacted,
    firstBreak,
    checkedAt: new Date().toISOString(),
  }
}

/** Read in this order, a chain that grows meanwhile never looks longer than its record says. */
async function readHead(read: Reader, chainId: string): Promise<Head> {
  const [last] = await read
    .select({ position: max(auditEvents.position) })
    .from(auditEvents)
    .where(eq(auditEvents.chainId, chainId))
  const [chain] = await read.select().from(auditChains).where(eq(auditChains.id, chainId))
  if (!chain) throw new AppError('not-found')
  const stated = await read
    .select({ count: datasets.auditCount, hash: datasets.auditHeadHash })
    .from(datasets)
    .where(eq(datasets.studyId, chainId))
  return {
    count: chain.count,
    headHash: chain.headHash,
    lastPosition: last?.position ?? 0,
    anchors: new Map(stated.map(({ count, hash }) => [count, hash])),
  }
}

/** Where a stretch begins, its link is the hash that the stretch before it ended with. */
async function hashAt(read: Reader, chainId: string, position: number): Promise<string> {
  const [row] = await read
    .select({ hash: auditEvents.hash })
    .from(auditEvents)
    .where(and(eq(auditEvents.chainId, chainId), eq(auditEvents.position, position)))
  return row?.hash ?? NO_HASH_YET
}

type Walked = {
  position: number
  hash: string
  /** Values met so far that two people have blanked. */
  redacted: number
  firstBreak: Break | null
}

async function walkPage(
  read: Reader,
  chainId: string,
  from: Walked,
  to: number,
  head: Head,
): Promise<Walked> {
  const last = Math.min(from.position + EVENTS_AT_A_TIME, to)
  const [events, values] = await Promise.all([
    eventsBetween(read, chainId, from.position, last),
    valuesBetween(read, chainId, from.position, last),
  ])
  let walked = from
  for (const event of events) {
    const own = values.get(event.position) ?? []
    const firstBreak = breakOfEvent(event, own, walked) ?? breakOfAnchor(event, head.anchors)
    if (firstBreak) return { ...walked, firstBreak }
    const redacted = own.filter((value) => value.redactedAt !== null).length
    walked = {
      ...walked,
      position: event.position,
      hash: event.hash,
      redacted: walked.redacted + redacted,
    }
  }
  if (walked.position === last) return walked
  const gap = walked.position + 1
  return { ...walked, firstBreak: { position: gap, what: `Event ${gap} is missing.` } }
}

const eventsBetween = (read: Reader, chainId: string, after: number, last: number) =>
  read
    .select()
    .from(auditEvents)
    .where(
      and(
        eq(auditEvents.chainId, chainId),
        gt(auditEvents.position, after),
        lte(auditEvents.position, last),
      ),
    )
    .orderBy(asc(auditEvents.position))

type ValueRow = typeof auditValues.$inferSelect

async function valuesBetween(read: Reader, chainId: string, after: number, last: number) {
  const rows = await read
    .select()
    .from(auditValues)
    .where(
      and(
        eq(auditValues.chainId, chainId),
        gt(auditValues.position, after),
        lte(auditValues.position, last),
      ),
    )
    .orderBy(asc(auditValues.position), asc(auditValues.ordinal))
  const byPosition = new Map<number, ValueRow[]>()
  for (const row of rows) {
    const there = byPosition.get(row.position)
    if (there) there.push(row)
    else byPosition.set(row.position, [row])
  }
  return byPosition
}

/** A frozen dataset states how long the chain was and where it ended: that cannot change later. */
function breakOfAnchor(
  event: { position: number; hash: string },
  anchors: Map<number, string>,
): Break | null {
  const stated = anchors.get(event.position)
  if (stated === undefined || stated === event.hash) return null
  return {
    position: event.position,
    what: `Event ${event.position} is not the one that the manifest of a dataset states as the end of the trail at its lock: the trail up to there was rewritten.`,
  }
}

function endBreak(walked: Walked, head: Head): Break | null {
  if (head.lastPosition > head.count)
    return {
      position: head.count + 1,
      what: `There are events after number ${head.count}, where the trail ends by its own record.`,
    }
  if (walked.hash !== head.headHash)
    return {
      position: head.count,
      what: 'The last event is not the one that the trail records as its head: the end of the trail was rewritten.',
    }
  return null
}
