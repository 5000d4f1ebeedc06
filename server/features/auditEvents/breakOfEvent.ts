import type { auditEvents } from '#db/schema/auditEvents.ts'
import type { auditValues } from '#db/schema/auditValues.ts'
import { eventHash, valueDigest, widest } from '#server/changes/auditTrail.ts'

type EventRow = typeof auditEvents.$inferSelect
type ValueRow = typeof auditValues.$inferSelect
type Digest = EventRow['digests'][number]

export type Break = { position: number; what: string }

/** What does not hold in one event and its values, given the event before it; null where all does. */
export function breakOfEvent(
  event: EventRow,
  values: readonly ValueRow[],
  before: { position: number; hash: string },
): Break | null {
  const { position } = event
  if (position !== before.position + 1) {
    const gap = before.position + 1
    return { position: gap, what: `Event ${gap} is missing.` }
  }
  // The link first: an event that was moved does not match its own hash either.
  if (event.previousHash !== before.hash)
    return {
      position,
      what:
        before.position === 0
          ? `Event ${position} does not begin the trail: what came before it was removed.`
          : `Event ${position} does not follow event ${before.position}: one was replaced or their order was changed.`,
    }
  if (eventHash(event) !== event.hash)
    return { position, what: `Event ${position} was changed after it was written.` }
  const what = breakOfValues(event, values)
  return what === null ? null : { position, what }
}

function breakOfValues(event: EventRow, values: readonly ValueRow[]): string | null {
  const { position, digests } = event
  for (const [ordinal, digest] of digests.entries()) {
    const value = values.find((each) => each.ordinal === ordinal)
    if (!value) return `The value of "${digest.field}" in event ${position} was removed.`
    if (value.field !== digest.field)
      return `A value of event ${position} stands under "${value.field}" instead of "${digest.field}".`
    if (!holds(value, digest))
      return `The value of "${digest.field}" in event ${position} was changed.`
  }
  if (values.length > digests.length)
    return `Event ${position} has values that it did not have when it was written.`
  if (widest(values.map((value) => value.informationClass)) !== event.informationClass)
    return `The information class of a value in event ${position} was changed.`
  return null
}

function holds(value: ValueRow, digest: Digest): boolean {
  const redacted = value.redactedAt !== null
  return (
    matches(value.oldValue, value.oldSalt, digest.old, redacted) &&
    matches(value.newValue, value.newSalt, digest.new, redacted)
  )
}

/** A redacted value is gone together with its salt; its digest still stands in the event. */
function matches(
  text: string | null,
  salt: string | null,
  digest: string | null,
  redacted: boolean,
): boolean {
  if (text === null && salt === null) return digest === null || redacted
  return text !== null && salt !== null && digest === valueDigest(salt, text)
}
