import { useQuery } from '@tanstack/react-query'
import { may, useStudy } from '../api/study.ts'
import { PanelForm } from '../features/analyses/PanelForm.tsx'
import { StandingFacts } from '../features/analyses/StandingFacts.tsx'
import { useStoreRun } from '../features/analyses/useStoreRun.ts'
import { datasetQuery, datasetsQuery } from '../features/datasets/datasets.api.ts'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** Several gases together, with the area corrected for fitting. */
export default function PanelPage() {
  const study = useStudy()
  const datasets = useQuery(datasetsQuery(study.id))
  const newest = datasets.data?.[0]
  const dataset = useQuery({ ...datasetQuery(newest?.id ?? ''), enabled: newest !== undefined })
  const { store, open } = useStoreRun(study.id, newest?.id ?? '')
  const error = datasets.error ?? dataset.error
  return (
    <>
      <PageHead
        title="Fit a panel"
        sub="Computed from the frozen rows and stored; what is stored can go into reports."
        back={{ to: `/studies/${study.id}/results`, label: 'Results' }}
      />
      {error ? (
        <ErrorNotice what="The dataset could not be read" error={error} />
      ) : !may(study, 'analysis.run') || datasets.data?.length === 0 ? (
        <Sheet>
          <EmptyPlace title="Nothing to compute here">
            Analysts compute on frozen data, after the lock.
          </EmptyPlace>
        </Sheet>
      ) : !dataset.data ? (
        <SheetSkeleton />
      ) : (
        <Sheet
          label="About the data"
          margin={<StandingFacts caution={dataset.data.caution} dataset={dataset.data} />}
        >
          <PanelForm dataset={dataset.data} onStore={store} onStored={open} />
        </Sheet>
      )}
    </>
  )
}
