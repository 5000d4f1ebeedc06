import { randomBytes } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import type { Database } from '#db/client.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { auditEvents, type FieldDigest } from '#db/schema/auditEvents.ts'
import { auditValues } from '#db/schema/auditValues.ts'
import { INFORMATION_CLASSES, type InformationClass } from '#shared/policy/informationClasses.ts'
import type { Membership } from '#shared/policy/people.ts'
import type { Actor } from './actor.ts'
import { canonicalJson, sha256Hex } from './hash.ts'
import { insertMany } from './insertMany.ts'

export type FieldChange = {
  field: string
  informationClass: InformationClass
  old?: unknown
  new?: unknown
}

/** What happened to one record; who, when and why are added when it is appended. */
export type Happening = {
  event: string
  recordType: string
  recordId: string
  recordLabel?: string | null
  recordSiteId?: string | null
  /** When it was observed, if that differs from when it was entered. */
  collectedAt?: Date | null
  /** When it was typed, if that differs from when the server received it. */
  enteredAt?: Date | null
  fields: FieldChange[]
}

export type Circumstance = {
  actor: Pick<Actor, 'name' | 'requestId' | 'localOffset'> & { personId: string | null }
  line: Membership | null
  reason: string | null
  at: Date
}

type EventRow = typeof auditEvents.$inferInsert
type ValueRow = typeof auditValues.$inferInsert

/** SHA-256(salt ‖ value): tells nothing without the salt, proves the value with it. */
export const valueDigest = (salt: string, value: string): string => sha256Hex(salt + value)

/** The hash of an event: over all of it but the hash, the previous event's hash included. */
export function eventHash(event: EventRow): string {
  const { hash: _hash, ...rest } = event
  return sha256Hex(canonicalJson(rest))
}

/**
 * Appends events to a chain: takes its head for itself, links each event to the one before, and
 * moves the head. The last thing that a transaction does, since every write waits here for its turn.
 */
export async function appendEvents(
  tx: Pick<Database, 'update' | 'execute'>,
  chainId: string,
  happenings: readonly Happening[],
  circumstance: Circumstance,
): Promise<void> {
  if (happenings.length === 0) return
  const [rows] = (await tx.execute(
    sql`select ${auditChains.count} as count, ${auditChains.headHash} as headHash from ${auditChains} where ${auditChains.id} = ${chainId} for update`,
  )) as unknown as [{ count: number; headHash: string }[]]
  const head = rows[0]
  if (!head) throw new Error(`There is no audit chain ${chainId}.`)

  let position = Number(head.count)
  let previousHash = head.headHash
  const events: EventRow[] = []
  const values: ValueRow[] = []
  for (const happening of happenings) {
    position += 1
    const salted = happening.fields.map((field, ordinal) =>
      saltedValue(field, { chainId, position, ordinal }),
    )
    const event = eventRow(happening, circumstance, { chainId, position, previousHash, salted })
    previousHash = event.hash
    events.push(event)
    values.push(...salted.map((each) => each.row))
  }
  await insertMany(tx, auditEvents, events)
  await insertMany(tx, auditValues, values)
  await tx
    .update(auditChains)
    .set({ count: position, headHash: previousHash })
    .where(eq(auditChains.id, chainId))
}

type Salted = { row: ValueRow; digest: FieldDigest }

function saltedValue(
  change: FieldChange,
  place: { chainId: string; position: number; ordinal: number },
): Salted {
  const oldValue = storedText(change.old)
  const newValue = storedText(change.new)
  const oldSalt = oldValue === null ? null : randomBytes(16).toString('hex')
  const newSalt = newValue === null ? null : randomBytes(16).toString('hex')
  return {
    row: {
      ...place,
      field: change.field,
      informationClass: change.informationClass,
      oldValue,
      oldSalt,
      newValue,
      newSalt,
    },
    digest: {
      field: change.field,
      old: oldSalt === null ? null : valueDigest(oldSalt, oldValue!),
      new: newSalt === null ? null : valueDigest(newSalt, newValue!),
    },
  }
}

/** Text is kept as it is, instants as UTC, everything else as canonical JSON. */
function storedText(value: unknown): string | null {
  if (value === null || value === undefined) return null
  if (typeof value === 'string') return value
  if (value instanceof Date) return value.toISOString()
  return canonicalJson(value)
}

function eventRow(
  happening: Happening,
  { actor, line, reason, at }: Circumstance,
  link: { chainId: string; position: number; previousHash: string; salted: Salted[] },
): EventRow {
  const event: EventRow = {
    chainId: link.chainId,
    position: link.position,
    event: happening.event,
    recordType: happening.recordType,
    recordId: happening.recordId,
    recordLabel: happening.recordLabel ?? null,
    recordSiteId: happening.recordSiteId ?? null,
    informationClass: widest(happening.fields.map((field) => field.informationClass)),
    personId: actor.personId,
    personName: actor.name,
    role: line?.role ?? null,
    duty: line?.duty ?? null,
    siteId: line?.siteId ?? null,
    reason,
    collectedAt: happening.collectedAt ?? null,
    enteredAt: happening.enteredAt ?? null,
    receivedAt: at,
    localOffset: actor.localOffset,
    requestId: actor.requestId,
    digests: link.salted.map((each) => each.digest),
    previousHash: link.previousHash,
    hash: '',
  }
  return { ...event, hash: eventHash(event) }
}

/** Index and reference in one event make it linked. */
export function widest(classes: readonly InformationClass[]): InformationClass {
  if (classes.includes('index') && classes.includes('reference')) return 'linked'
  return [...INFORMATION_CLASSES].reverse().find((each) => classes.includes(each)) ?? 'none'
}
