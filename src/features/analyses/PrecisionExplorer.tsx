import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { type ReactNode, useState } from 'react'
import type { Dataset } from '#shared/schemas/dataset.ts'
import type { MeasuredBy, PrecisionParameters } from '#shared/schemas/precision.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { ApiError } from '../../api/ApiError.ts'
import { ErrorNotice } from '../../ui/ErrorNotice.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Skeleton } from '../../ui/Skeleton.tsx'
import type { ExplorerSettings } from './explorerSettings.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { NumberBox } from './NumberBox.tsx'
import { PrecisionPanels } from './PrecisionPanels.tsx'
import { accuracyAnalysesQuery, type PrecisionWanted, precisionQuery } from './precision.api.ts'
import { readingNotes } from './readingNotes.ts'
import { SelectChoice } from './SelectChoice.tsx'
import { StandingFacts } from './StandingFacts.tsx'

type PrecisionExplorerProps = {
  studyId: string
  dataset: Dataset
  settings: ExplorerSettings
  toolbar: ReactNode
  /** The store button for the settings as they are now. */
  store: (parameters: PrecisionParameters) => ReactNode
}

const MEASURED_BY: { value: MeasuredBy; label: string }[] = [
  { value: 'sensor', label: 'The sensor' },
  { value: 'reference', label: 'The reference analyser' },
]

/** How readings repeat within subjects; computed on the server from frozen rows, not stored. */
export function PrecisionExplorer(props: PrecisionExplorerProps) {
  const { studyId, dataset, settings, toolbar, store } = props
  const { analyteKey } = settings
  const [wanted, setWanted] = useState<Omit<PrecisionWanted, 'analyteKey'>>({
    measuredBy: 'sensor',
    reliabilityWanted: 0.9,
    accuracyId: null,
  })
  const change = (changes: Partial<PrecisionWanted>) =>
    setWanted((before) => ({ ...before, ...changes }))
  const explored = useQuery({
    ...precisionQuery(dataset.id, { ...wanted, analyteKey }),
    placeholderData: keepPreviousData,
  })
  const { data, error } = explored
  const counts = data?.result.counts
  const refused = error instanceof ApiError && error.code === 'statistics-refused'
  return (
    <>
      <Sheet
        label="About this exploration"
        margin={
          <StandingFacts
            caution={dataset.caution}
            dataset={dataset}
            {...(counts && !error
              ? {
                  counted: (
                    <LeftOutList
                      subjects={counts.subjects}
                      counted={counts.counted}
                      leftOut={counts.leftOut}
                      notes={readingNotes(counts)}
                    />
                  ),
                  interval: `${data.result.withinSubjectSd.method}, ${levelWords(data.parameters.confidence)}`,
                }
              : {})}
            run="Computed to look at, not stored"
          />
        }
      >
        {toolbar}
        <div className="mb-6 max-w-[320px]">
          <SelectChoice
            label="Readings of"
            value={wanted.measuredBy}
            options={MEASURED_BY}
            onChange={(measuredBy) => change({ measuredBy, accuracyId: null })}
          />
        </div>
        {refused ? (
          <Notice tone="warn" title="The figures cannot be computed from these data">
            {error.message}
          </Notice>
        ) : error ? (
          <ErrorNotice
            what="The precision could not be computed"
            error={error}
            onRetry={() => void explored.refetch()}
          />
        ) : data ? (
          <PrecisionPanels
            result={data.result}
            parameters={data.parameters}
            settings={
              <CostSettings
                studyId={studyId}
                datasetId={dataset.id}
                wanted={{ ...wanted, analyteKey }}
                onChange={change}
              />
            }
          />
        ) : (
          <Skeleton lines={8} />
        )}
      </Sheet>
      {data && !error && store(data.parameters)}
    </>
  )
}

function CostSettings(props: {
  studyId: string
  datasetId: string
  wanted: PrecisionWanted
  onChange: (changes: Partial<PrecisionWanted>) => void
}) {
  const { studyId, datasetId, wanted, onChange } = props
  const stored = useQuery(accuracyAnalysesQuery(studyId, datasetId, wanted.analyteKey))
  const options = [
    { value: '', label: 'None' },
    ...(stored.data ?? []).map(({ id, number, title }) => ({
      value: id,
      label: `No. ${number}, ${title}`,
    })),
  ]
  return (
    <div className="space-y-3">
      {wanted.measuredBy === 'sensor' && (
        <SelectChoice
          label="Stored accuracy analysis"
          hint={
            stored.data?.length === 0 ? 'none of this analyte is stored yet' : 'of this dataset'
          }
          value={wanted.accuracyId ?? ''}
          options={options}
          onChange={(id) => onChange({ accuracyId: id === '' ? null : id })}
        />
      )}
      <NumberBox
        label="Reliability wanted"
        value={wanted.reliabilityWanted}
        onChange={(value) => value !== null && onChange({ reliabilityWanted: value })}
        refuse={(value) => (value > 0 && value < 1 ? null : 'Between 0 and 1, such as 0.9.')}
      />
    </div>
  )
}
