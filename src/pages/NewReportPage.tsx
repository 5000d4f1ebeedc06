import { useQuery } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { may, useStudy } from '../api/study.ts'
import { analysesQuery } from '../features/analyses/analyses.api.ts'
import { datasetsQuery } from '../features/datasets/datasets.api.ts'
import { IssueReportForm } from '../features/reports/IssueReportForm.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { Caution } from '../ui/Caution.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** Issues a report on stored analyses. */
export default function NewReportPage() {
  const study = useStudy()
  const back = `/studies/${study.id}/reports`
  return (
    <>
      <PageHead title="Issue a report" back={{ to: back, label: 'Reports' }} />
      {may(study, 'report.issue') ? (
        <NewReport back={back} />
      ) : (
        <Sheet>
          <EmptyPlace title="Reports are issued by analysts">
            Your role in this study does not include it.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

function NewReport({ back }: { back: string }) {
  const study = useStudy()
  const navigate = useNavigate()
  const datasets = useQuery(datasetsQuery(study.id))
  const analyses = useQuery(analysesQuery(study.id))
  const error = datasets.error ?? analyses.error
  if (error)
    return (
      <ErrorNotice
        what="What a report is made of could not be read"
        error={error}
        onRetry={() => void Promise.all([datasets.refetch(), analyses.refetch()])}
      />
    )
  if (!datasets.data || !analyses.data) return <SheetSkeleton />
  return (
    <Sheet
      label="About issuing a report"
      margin={
        <>
          <Caution title={study.caution.title}>{study.caution.text}</Caution>
          <p>
            The open part tells numbers of subjects and completeness. The closed part shows the
            chosen analyses with their figures.
          </p>
          <p>Both are stored under their hashes and cannot be changed or taken back.</p>
          <p>Everybody who may read a part gets a letter with a link and no data.</p>
        </>
      }
    >
      {analyses.data.length === 0 ? (
        <EmptyPlace
          title="There is no stored analysis yet"
          action={<ButtonLink to={`/studies/${study.id}/results`}>Go to the results</ButtonLink>}
        >
          A report shows stored analyses. Run one on locked data first.
        </EmptyPlace>
      ) : (
        <IssueReportForm
          studyId={study.id}
          datasets={datasets.data}
          analyses={analyses.data}
          onAsked={() => navigate(back)}
          onCancel={() => navigate(back)}
        />
      )}
    </Sheet>
  )
}
