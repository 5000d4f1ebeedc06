import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import { formatCount } from '#shared/terms/numbers.ts'
import { useStudy } from '../api/study.ts'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import { sessionColumns } from '../features/sessions/sessionColumns.tsx'
import { sessionsQuery } from '../features/sessions/sessions.api.ts'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { CodeAndSiteFilter } from '../features/subjects/CodeAndSiteFilter.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { useTableParams } from '../ui/useTableParams.ts'

const FILTERS = ['code', 'siteId'] as const
/** With more columns than this the table scrolls in a box of its own. */
const WIDE_FROM = 9

/** The sensor's values, session by session, as they were entered. */
export default function SessionsPage() {
  const { counts } = useStudy()
  const mayList = useMay('session.list')
  return (
    <>
      <PageHead title="Breath sessions" sub="The sensor’s values as they were entered" />
      {mayList ? (
        <Sessions />
      ) : (
        <Sheet>
          <EmptyPlace title="Sensor values are not open to your place in this study">
            {formatCount(counts.sessions)} {counts.sessions === 1 ? 'session is' : 'sessions are'}{' '}
            recorded.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

function Sessions() {
  const study = useStudy()
  const params = useTableParams({ filters: FILTERS })
  const sessions = useQuery(sessionsQuery(study.id, params.request))
  const analytes = useQuery(analytesQuery(study.id))
  const sites = useQuery(sitesQuery(study.id))
  const mayImport = useMay('import.upload')
  const severalSites = (sites.data?.length ?? 0) > 1
  const columns = useMemo(
    () => sessionColumns(analytes.data ?? [], severalSites),
    [analytes.data, severalSites],
  )
  return (
    <Sheet
      label="About these values"
      margin={
        <>
          <Caution title={study.caution.title}>{study.caution.text}</Caution>
          <p>
            Every digit is shown as it was entered. “&lt; LoD” marks a value below the limit of
            detection, kept as it was given.
          </p>
          {study.kind === 'earlierData' && (
            <p>Values of earlier data come in with a file and are not typed here.</p>
          )}
        </>
      }
    >
      <DataTable
        caption="Breath sessions"
        hideCaption
        columns={columns}
        rows={sessions.data?.items}
        rowId={(session) => session.id}
        params={params}
        order="server"
        page={sessions.data}
        status={sessions}
        scroll={columns.length > WIDE_FROM}
        filters={
          study.counts.sessions > 0 ? (
            <CodeAndSiteFilter params={params} sites={sites.data ?? []} />
          ) : undefined
        }
        empty={
          <EmptyPlace
            title="No session yet"
            action={mayImport && <ButtonLink to="../imports">Bring in a file</ButtonLink>}
          >
            {study.counts.sessions > 0
              ? 'Nothing is recorded at the sites that you see.'
              : 'Sessions come in with the file of earlier data.'}
          </EmptyPlace>
        }
      />
    </Sheet>
  )
}
