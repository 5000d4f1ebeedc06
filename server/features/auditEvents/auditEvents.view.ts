import type { Allowed } from '#server/changes/targets.ts'
import { type InformationClass, maySee } from '#shared/policy/informationClasses.ts'
import type { Membership } from '#shared/policy/people.ts'
import type { AuditEvent, AuditValue } from '#shared/schemas/auditEvent.ts'
import type { AuditEventRow, AuditValueRow } from './auditEvents.reads.ts'

/** An event as this reader may see it: values of a class that is hidden from them are left out. */
export function toAuditEvent(row: AuditEventRow, allowed: Allowed): AuditEvent {
  const { recordSiteId, values, ...event } = row
  const sees = (informationClass: InformationClass) =>
    seesValues(allowed, recordSiteId, informationClass)
  const reasonHidden = row.reason !== null && !sees(row.informationClass)
  return {
    ...event,
    reason: reasonHidden ? null : row.reason,
    reasonHidden,
    collectedAt: row.collectedAt?.toISOString() ?? null,
    enteredAt: row.enteredAt?.toISOString() ?? null,
    receivedAt: row.receivedAt.toISOString(),
    values: values.map((value) => toValue(value, !sees(value.informationClass))),
  }
}

const toValue = (row: AuditValueRow, hidden: boolean): AuditValue => ({
  field: row.field,
  old: hidden ? null : row.oldValue,
  new: hidden ? null : row.newValue,
  hidden,
  redacted: row.redactedAt !== null,
})

/**
 * Whether one of the reader's lines that reach the record's site opens a class. A single linked value
 * asks for both classes as well: what oversight and analysts may know as linked are reports and
 * datasets, not values one by one.
 */
function seesValues(
  allowed: Allowed,
  siteId: string | null,
  informationClass: InformationClass,
): boolean {
  if (informationClass === 'none' || allowed.kind === 'earlierData') return true
  const needed: InformationClass[] =
    informationClass === 'linked' ? ['index', 'reference', 'linked'] : [informationClass]
  return allowed.memberships
    .filter((line: Membership) => line.siteId === null || line.siteId === siteId)
    .some((line) => needed.every((each) => maySee(line.role, line.duty, each, allowed.released)))
}
