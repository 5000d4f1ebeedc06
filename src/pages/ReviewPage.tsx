import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import type { AuditEvent } from '#shared/schemas/auditEvent.ts'
import { may, useStudy } from '../api/study.ts'
import { AuditEventDialog } from '../features/auditEvents/AuditEventDialog.tsx'
import { AUDIT_FILTERS, AuditTrailFilters } from '../features/auditEvents/AuditTrailFilters.tsx'
import { auditEventColumns } from '../features/auditEvents/auditEventColumns.tsx'
import { auditEventsQuery } from '../features/auditEvents/auditEvents.api.ts'
import { ChainCheck } from '../features/auditEvents/ChainCheck.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { useTableParams } from '../ui/useTableParams.ts'

/** Review: the audit trail to read, filter and verify. */
export default function ReviewPage() {
  const study = useStudy()
  return (
    <>
      <PageHead
        title="Audit trail"
        sub="Who did what, when and why. Nothing here can be changed or removed."
      />
      {may(study, 'auditEvent.list') ? (
        <Trail studyId={study.id} verify={may(study, 'auditEvent.verify')} />
      ) : (
        <Sheet>
          <EmptyPlace title="The trail is not open to your role in this study">
            Coordinators who lead a site or the study, and monitors with oversight, read it.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

function Trail({ studyId, verify }: { studyId: string; verify: boolean }) {
  const params = useTableParams({ filters: AUDIT_FILTERS })
  const trail = useQuery(auditEventsQuery(studyId, params.request))
  const [opened, setOpened] = useState<AuditEvent | null>(null)
  const columns = useMemo(() => auditEventColumns(setOpened), [])
  return (
    <Sheet
      label="About the trail"
      margin={
        <>
          {verify && <ChainCheck studyId={studyId} />}
          <p>
            Each event carries the hash of the one before it. A change, a gap or a new order breaks
            the chain at that place.
          </p>
          <p>Values that your role may not know are hidden and say so.</p>
        </>
      }
    >
      <DataTable
        caption="Events, the newest first"
        columns={columns}
        rows={trail.data?.items}
        rowId={(event) => String(event.position)}
        params={params}
        order="server"
        page={trail.data}
        status={trail}
        filters={<AuditTrailFilters params={params} />}
        empty={
          <EmptyPlace title="Nothing has happened yet">
            The first change in this study starts the trail.
          </EmptyPlace>
        }
      />
      <AuditEventDialog event={opened} onClose={() => setOpened(null)} />
    </Sheet>
  )
}
