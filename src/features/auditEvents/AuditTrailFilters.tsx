import { AUDIT_EVENT_LABELS } from '#shared/terms/auditEvents.ts'
import { TableChoice, TableSearch } from '../../ui/TableFilters.tsx'
import type { TableParams } from '../../ui/useTableParams.ts'
import { DayFilter } from './DayFilter.tsx'

export const AUDIT_FILTERS = ['event', 'person', 'record', 'from', 'to'] as const

/** Sign-ins belong to no study; their events stand in the installation's own trail. */
const EVENT_OPTIONS = Object.entries(AUDIT_EVENT_LABELS)
  .filter(([event]) => !event.startsWith('login.'))
  .map(([value, label]) => ({ value, label }))
  .sort((a, b) => a.label.localeCompare(b.label, 'en-GB'))

export function AuditTrailFilters({ params }: { params: TableParams }) {
  return (
    <>
      <TableChoice params={params} name="event" label="Event" options={EVENT_OPTIONS} />
      <TableSearch params={params} name="record" label="Record" width="w-36" />
      <TableSearch params={params} name="person" label="Person" width="w-36" />
      <div className="flex flex-wrap gap-3">
        <DayFilter params={params} name="from" label="From" />
        <DayFilter params={params} name="to" label="To" />
      </div>
    </>
  )
}
