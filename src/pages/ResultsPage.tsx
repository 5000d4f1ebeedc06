import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { formatCount } from '#shared/terms/numbers.ts'
import { may, useStudy } from '../api/study.ts'
import { analysesQuery, analysisRunsQuery, isUnderWay } from '../features/analyses/analyses.api.ts'
import { analysisColumns } from '../features/analyses/analysisColumns.tsx'
import { RunStatus } from '../features/analyses/RunStatus.tsx'
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
              {may(study, 'analysis.run') && (
                <>
                  <ButtonLink to="compare" kind="quiet">
                    Compare biomarkers
                  </ButtonLink>
                  <ButtonLink to="panel" kind="quiet">
                    Fit a panel
                  </ButtonLink>
                </>
              )}
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

/** What is under way, and what ended without a result within a day. */
function RunList({ studyId }: { studyId: string }) {
  const queries = useQueryClient()
  const runs = useQuery(analysisRunsQuery(studyId)).data ?? []
  const underWay = runs.filter(isUnderWay).length
  useEffect(() => {
    // One more or one less under way: the list of what is stored may have changed.
    if (underWay >= 0) void queries.invalidateQueries({ queryKey: analysesQuery(studyId).queryKey })
  }, [underWay, queries, studyId])
  if (runs.length === 0) return null
  return (
    <div className="mb-5 flex flex-col gap-4 border-b border-rule pb-5">
      {runs.map((run) => (
        <RunStatus key={run.jobId} studyId={studyId} run={run} />
      ))}
    </div>
  )
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
      <RunList studyId={studyId} />
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
