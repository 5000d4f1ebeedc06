import { useQuery } from '@tanstack/react-query'
import type { ComponentType, ReactNode } from 'react'
import type { AnalysisParameters } from '#shared/schemas/analysis.ts'
import type { Dataset } from '#shared/schemas/dataset.ts'
import type { AnalysisKind } from '#shared/terms/analysis.ts'
import { useStudy } from '../api/study.ts'
import { AccuracyExplorer } from '../features/analyses/AccuracyExplorer.tsx'
import { AgreementExplorer } from '../features/analyses/AgreementExplorer.tsx'
import { CorrelationExplorer } from '../features/analyses/CorrelationExplorer.tsx'
import { ExplorerToolbar } from '../features/analyses/ExplorerToolbar.tsx'
import {
  type ExplorerSettings,
  useExplorerSettings,
} from '../features/analyses/explorerSettings.ts'
import { OtherMeasurand } from '../features/analyses/OtherMeasurand.tsx'
import { PrecisionExplorer } from '../features/analyses/PrecisionExplorer.tsx'
import { provenanceLines } from '../features/analyses/provenanceLines.ts'
import { StoreAnalysis } from '../features/analyses/StoreAnalysis.tsx'
import {
  datasetPairsQuery,
  datasetQuery,
  datasetsQuery,
  datasetValuesQuery,
} from '../features/datasets/datasets.api.ts'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Segments } from '../ui/Segments.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** Looks at frozen data under a moving cut-off, or sensor beside reference; stores on request. */
export default function ExplorePage() {
  const study = useStudy()
  const datasets = useQuery(datasetsQuery(study.id))
  const newest = datasets.data?.[0]
  const dataset = useQuery({ ...datasetQuery(newest?.id ?? ''), enabled: newest !== undefined })
  const error = datasets.error ?? dataset.error
  if (dataset.data) return <Explorer dataset={dataset.data} />
  return (
    <>
      <PageHead title="Explore" back={{ to: '..', label: 'Results' }} />
      {error ? (
        <ErrorNotice what="The dataset could not be read" error={error} />
      ) : datasets.data && !newest ? (
        <p>Results come after the lock.</p>
      ) : (
        <SheetSkeleton />
      )}
    </>
  )
}

function Explorer({ dataset }: { dataset: Dataset }) {
  const study = useStudy()
  const [settings, change] = useExplorerSettings(dataset)
  const title = titleOf(dataset, settings)
  const provenance = provenanceLines({
    caution: dataset.caution,
    studyCode: study.code,
    datasetHash: dataset.hash,
    stored: null,
  })
  const store = (parameters: AnalysisParameters) => (
    <StoreAnalysis datasetId={dataset.id} parameters={parameters} suggestedTitle={title} />
  )
  const toolbar = (severalSessions: number) => (
    <ExplorerToolbar
      dataset={dataset}
      settings={settings}
      onChange={change}
      severalSessions={severalSessions}
    />
  )
  const Part = PARTS[settings.kind] ?? Accuracy
  return (
    <>
      <PageHead
        title={title}
        sub="Exploring. Not stored, so not a result of the study."
        back={{ to: `/studies/${study.id}/results`, label: 'Results' }}
        actions={
          <Segments
            label="Question"
            hideLabel
            options={[
              { value: 'accuracy', label: 'Accuracy' },
              { value: 'agreement', label: 'Agreement' },
              { value: 'precision', label: 'Precision' },
              { value: 'correlation', label: 'Rank correlation' },
            ]}
            value={settings.kind}
            onChange={(kind) => change({ kind })}
          />
        }
      />
      <Part {...{ dataset, settings, change, provenance, store, toolbar }} />
    </>
  )
}

type PartProps = {
  dataset: Dataset
  settings: ExplorerSettings
  change: (changes: Partial<ExplorerSettings>) => void
  provenance: readonly string[]
  store: (parameters: AnalysisParameters) => ReactNode
  toolbar: (severalSessions: number) => ReactNode
}

function Accuracy({ dataset, settings, provenance, store, toolbar }: PartProps) {
  const values = useQuery(datasetValuesQuery(dataset.id, wantedOf(settings)))
  if (!values.data) return <Loading error={values.error} retry={() => void values.refetch()} />
  return (
    <AccuracyExplorer
      // Another question begins with its own cut-off.
      key={`${settings.analyteKey} ${settings.direction} ${settings.sessionRule}`}
      dataset={dataset}
      values={values.data}
      settings={settings}
      provenance={provenance}
      toolbar={toolbar(values.data.counts.severalSessions)}
      store={store}
    />
  )
}

function Agreement({ dataset, settings, change, provenance, store, toolbar }: PartProps) {
  const sameMeasurand = settings.referenceKey === settings.analyteKey
  const pairs = useQuery({
    ...datasetPairsQuery(dataset.id, wantedOf(settings)),
    enabled: sameMeasurand,
  })
  if (!sameMeasurand)
    return (
      <OtherMeasurand
        dataset={dataset}
        settings={settings}
        toolbar={toolbar(0)}
        onChange={change}
      />
    )
  if (!pairs.data) return <Loading error={pairs.error} retry={() => void pairs.refetch()} />
  return (
    <AgreementExplorer
      key={`${settings.analyteKey} ${settings.sessionRule}`}
      dataset={dataset}
      pairs={pairs.data}
      settings={settings}
      provenance={provenance}
      toolbar={toolbar(pairs.data.counts.severalSessions)}
      store={store}
    />
  )
}

function Correlation({ dataset, settings, store, toolbar }: PartProps) {
  const { referenceKey } = settings
  const pairs = useQuery(datasetPairsQuery(dataset.id, { ...wantedOf(settings), referenceKey }))
  if (!pairs.data) return <Loading error={pairs.error} retry={() => void pairs.refetch()} />
  return (
    <CorrelationExplorer
      dataset={dataset}
      pairs={pairs.data}
      toolbar={toolbar(pairs.data.counts.severalSessions)}
      store={store}
    />
  )
}

function Precision({ dataset, settings, store, toolbar }: PartProps) {
  const study = useStudy()
  return (
    <PrecisionExplorer
      key={settings.analyteKey}
      studyId={study.id}
      dataset={dataset}
      settings={settings}
      toolbar={toolbar(0)}
      store={store}
    />
  )
}

function Loading({ error, retry }: { error: unknown; retry: () => void }) {
  if (error)
    return <ErrorNotice what="The values could not be read" error={error} onRetry={retry} />
  return <SheetSkeleton />
}

const PARTS: Partial<Record<AnalysisKind, ComponentType<PartProps>>> = {
  accuracy: Accuracy,
  agreement: Agreement,
  precision: Precision,
  correlation: Correlation,
}

const wantedOf = ({ analyteKey, sessionRule }: ExplorerSettings) => ({ analyteKey, sessionRule })

function titleOf({ manifest, protocol }: Dataset, settings: ExplorerSettings): string {
  const { kind, analyteKey, referenceKey } = settings
  const nameOf = (key: string) => manifest.analytes.find((each) => each.key === key)?.name
  const name = nameOf(analyteKey) ?? 'Analyte'
  if (kind === 'precision') return `${name}: from session to session`
  if (kind === 'correlation' && referenceKey !== analyteKey)
    return `${name} by the sensor, ${nameOf(referenceKey)} by the reference analyser`
  return kind === 'accuracy'
    ? `${name} against ${protocol.targetCondition}`
    : `${name}: sensor against reference analyser`
}
