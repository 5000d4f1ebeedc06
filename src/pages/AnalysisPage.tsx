import { useQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import type { Analysis } from '#shared/schemas/analysis.ts'
import { may, useStudy } from '../api/study.ts'
import { analysisQuery, analysisRunsQuery } from '../features/analyses/analyses.api.ts'
import { analysisSub } from '../features/analyses/analysisSub.ts'
import { provenanceLines } from '../features/analyses/provenanceLines.ts'
import { RunStatus } from '../features/analyses/RunStatus.tsx'
import { StoredAnalysis } from '../features/analyses/StoredAnalysis.tsx'
import { datasetPairsQuery, datasetValuesQuery } from '../features/datasets/datasets.api.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** One stored analysis under its own address. */
export default function AnalysisPage() {
  const study = useStudy()
  const { analysisId = '' } = useParams()
  // While a run is told of there is nothing stored yet; once it no longer is, there is.
  const runs = useQuery(analysisRunsQuery(study.id))
  const run = runs.data?.find((each) => each.id === analysisId)
  const analysis = useQuery({ ...analysisQuery(analysisId), enabled: runs.isFetched && !run })
  if (analysis.data) return <Stored analysis={analysis.data} />
  return (
    <>
      <PageHead title="Analysis" back={{ to: `/studies/${study.id}/results`, label: 'Results' }} />
      {run ? (
        <Sheet>
          <RunStatus studyId={study.id} run={run} />
        </Sheet>
      ) : analysis.error ? (
        <ErrorNotice
          what="The analysis could not be read"
          error={analysis.error}
          onRetry={() => void analysis.refetch()}
        />
      ) : (
        <SheetSkeleton />
      )}
    </>
  )
}

function Stored({ analysis }: { analysis: Analysis }) {
  const study = useStudy()
  const { parameters } = analysis
  const { kind } = parameters
  const wanted =
    kind === 'accuracy' || kind === 'agreement'
      ? { analyteKey: parameters.analyteKey, sessionRule: parameters.sessionRule }
      : { analyteKey: '', sessionRule: 'first' as const }
  const values = useQuery({
    ...datasetValuesQuery(analysis.datasetId, wanted),
    enabled: kind === 'accuracy',
  })
  const pairs = useQuery({
    ...datasetPairsQuery(analysis.datasetId, wanted),
    enabled: kind === 'agreement',
  })
  const failed = values.error ?? pairs.error
  return (
    <>
      <PageHead
        title={analysis.title}
        sub={analysisSub(analysis)}
        back={{ to: `/studies/${study.id}/results`, label: 'Results' }}
        actions={
          may(study, 'report.issue') ? (
            <ButtonLink to={`/studies/${study.id}/reports`} kind="quiet">
              Go to the reports
            </ButtonLink>
          ) : undefined
        }
      />
      {failed && <ErrorNotice what="The figures could not be drawn" error={failed} />}
      <StoredAnalysis
        analysis={analysis}
        values={values.data}
        pairs={pairs.data}
        provenance={provenanceLines({
          caution: analysis.caution,
          studyCode: study.code,
          datasetHash: analysis.datasetHash,
          stored: analysis,
        })}
        mayRepeat={may(study, 'analysis.repeat')}
      />
    </>
  )
}
