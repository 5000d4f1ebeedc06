import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, useMemo } from 'react'
import { formatCount } from '#shared/terms/numbers.ts'
import { meQuery } from '../api/me.ts'
import { may, studyQuery, useStudy } from '../api/study.ts'
import { ReportsUnderWay } from '../features/reports/ReportsUnderWay.tsx'
import { reportColumns } from '../features/reports/reportColumns.tsx'
import { reportsQuery } from '../features/reports/reports.api.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { Facts } from '../ui/Facts.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** Reports: what was issued, its two parts, and what is being written. */
export default function ReportsPage() {
  const study = useStudy()
  const me = useQuery(meQuery)
  const reports = useQuery(reportsQuery(study.id))
  const mayIssue = may(study, 'report.issue')
  const isFrozen = study.counts.locks > 0
  const issued = reports.data?.filter((report) => report.state === 'issued').length
  useFreshCourse(study.id, issued)

  const columns = useMemo(
    () =>
      reportColumns({
        studyId: study.id,
        mayIssue: may(study, 'report.issue'),
        mayOpen: { open: may(study, 'report.readOpen'), closed: may(study, 'report.readClosed') },
      }),
    [study],
  )
  const issueLink = <ButtonLink to={`/studies/${study.id}/reports/new`}>Issue a report</ButtonLink>
  return (
    <>
      <PageHead
        title="Reports"
        sub={issued === undefined ? undefined : `${formatCount(issued)} issued`}
        actions={mayIssue && isFrozen ? issueLink : undefined}
      />
      <Sheet
        label="About the reports"
        margin={
          <>
            <Caution title={study.caution.title}>{study.caution.text}</Caution>
            <Facts
              items={[
                { term: 'Open part', value: 'Numbers and completeness, for everybody in the team' },
                { term: 'Closed part', value: 'Results, for oversight monitors and analysts' },
              ]}
            />
            <p>Opening a part is kept in the audit trail.</p>
          </>
        }
      >
        <ReportsUnderWay
          studyId={study.id}
          reports={reports.data ?? []}
          readerId={me.data?.person.id}
        />
        <DataTable
          caption="Reports, the newest first"
          columns={columns}
          rows={reports.data}
          rowId={(report) => report.id}
          status={reports}
          empty={
            <EmptyPlace
              title="No report has been issued yet"
              action={mayIssue && isFrozen ? issueLink : undefined}
            >
              {isFrozen
                ? 'An analyst chooses stored analyses and issues them as a PDF in two parts.'
                : 'Reports are written on locked data alone. First the data have to be locked.'}
            </EmptyPlace>
          }
        />
      </Sheet>
    </>
  )
}

/** The course counts issued reports: ask for the study again when one more is there. */
function useFreshCourse(studyId: string, issued: number | undefined): void {
  const queries = useQueryClient()
  useEffect(() => {
    if (issued !== undefined)
      void queries.invalidateQueries({ queryKey: studyQuery(studyId).queryKey })
  }, [queries, studyId, issued])
}
