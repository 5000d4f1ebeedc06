import type { Duty, Role } from '#shared/policy/people.ts'
import { ACTIONS, type Action, type PolicyRow, policyRow } from '#shared/policy/permissions.ts'
import type { AuditEvent, AuditValue } from '#shared/schemas/auditEvent.ts'
import { auditEventLabel } from '#shared/terms/auditEvents.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { DUTY_LABELS, ROLE_LABELS } from '#shared/terms/team.ts'

/** "Coordinator, bedside, North ward"; nothing for an attempt that no line of the team list covered. */
export function standingOf({ role, duty, personSiteName }: AuditEvent): string {
  return [
    role && (ROLE_LABELS[role as Role] ?? role),
    duty && (DUTY_LABELS[duty as Duty] ?? duty).toLowerCase(),
    personSiteName,
  ]
    .filter(Boolean)
    .join(', ')
}

/** Which record an event speaks of, and where; a refused attempt says what it would have been. */
export function recordInWords({ event, recordLabel, siteName }: AuditEvent): string {
  const label = event === 'attempt.refused' && recordLabel ? attemptOf(recordLabel) : recordLabel
  return [label, siteName].filter(Boolean).join(', ')
}

function attemptOf(action: string): string {
  const row: PolicyRow | undefined = ACTIONS.includes(action as Action)
    ? policyRow(action as Action)
    : undefined
  return row?.records ? `would have been “${auditEventLabel(row.records)}”` : action
}

/** What an event keeps, in a few words. */
export function valuesInWords(values: readonly AuditValue[]): string {
  if (values.length === 0) return 'no value'
  const hidden = values.filter((value) => value.hidden).length
  const all = `${formatCount(values.length)} ${values.length === 1 ? 'value' : 'values'}`
  if (hidden === 0) return all
  return hidden === values.length ? `${all}, hidden` : `${all}, ${formatCount(hidden)} hidden`
}
