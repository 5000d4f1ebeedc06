import { useQuery } from '@tanstack/react-query'
import { formatCount } from '#shared/terms/numbers.ts'
import { may, useStudy } from '../api/study.ts'
import { analysesQuery } from '../features/analyses/analyses.api.ts'
import { analysisColumns } from '../features/analyses/analysisColumns.tsx'
import { StandingFacts } from '../features/analyses/StandingFacts.tsx'
import { datasetsQuery } from '../features/datasets/datasets.api.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'
import { useTableParams } from '../ui/useTableParams.ts'

/** Results: what is stored, and the way to explore the frozen data. */
export default function ResultsPage() {
  const study = useStudy()
  const open = may(study, 'analysis.list')
  const datasets = useQuery({ ...datasetsQuery(study.id), enabled: open })
  return (
    <>
      <PageHead
        title="Results"
        sub="On locked data only. Only what is stored goes into reports."
        actions={
          datasets.data && datasets.data.length > 0 ? (
            <>
              <ButtonLink to="explore?kind=agreement" kind="quiet">
                Explore agreement
              </ButtonLink>
              <ButtonLink to="explore?kind=accuracy">Explore accuracy</ButtonLink>
            </>
          ) : undefined
        }
      />
      {!open ? (
        <Sheet>
          <EmptyPlace title="Results are not open to your role in this study">
            Analysts and study leads read them; monitors receive them in the reports.
          </EmptyPlace>
        </Sheet>
      ) : datasets.error ? (
        <ErrorNotice
          what="The results could not be read"
          error={datasets.error}
          onRetry={() => void datasets.refetch()}
        />
      ) : !datasets.data ? (
        <SheetSkeleton />
      ) : datasets.data.length === 0 ? (
        <Sheet>
          <EmptyPlace
            title="Results come after the lock"
            action={<ButtonLink to={`/studies/${study.id}/lock`}>Go to the lock</ButtonLink>}
          >
            A study lead asks for it, and a monitor approves and signs it. Until then nobody
            computes anything from these data here.
          </EmptyPlace>
        </Sheet>
      ) : (
        <StoredAnalyses studyId={study.id} dataset={datasets.data[0]!} />
      )}
    </>
  )
}

function storedWords(many: number): string {
  if (many === 0) return 'nothing yet'
  return many === 1 ? '1 analysis' : `${formatCount(many)} analyses`
}

type Newest = Parameters<typeof StandingFacts>[0]['dataset']

function StoredAnalyses({ studyId, dataset }: { studyId: string; dataset: Newest }) {
  const study = useStudy()
  const analyses = useQuery(analysesQuery(studyId))
  const params = useTableParams({ sort: '-number' })
  return (
    <Sheet
      label="About the results"
      margin={
        <StandingFacts
          caution={study.caution}
          dataset={dataset}
          more={[{ term: 'Stored', value: storedWords(analyses.data?.length ?? 0) }]}
        />
      }
    >
      <DataTable
        caption="Stored analyses"
        columns={analysisColumns}
        rows={analyses.data}
        rowId={(analysis) => analysis.id}
        params={params}
        status={analyses}
        empty={
          <EmptyPlace
            title="Nothing is stored yet"
            action={<ButtonLink to="explore?kind=accuracy">Explore accuracy</ButtonLink>}
          >
            Explore the frozen data, and store what is to stand.
          </EmptyPlace>
        }
      />
    </Sheet>
  )
}
