import { type ReactNode, useMemo } from 'react'
import type { Analysis } from '#shared/schemas/analysis.ts'
import type { DatasetPairs, DatasetValues } from '#shared/schemas/dataset.ts'
import { EARLIER_DATA_BADGE_REASON } from '#shared/terms/analysis.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Skeleton } from '../../ui/Skeleton.tsx'
import { AccuracyMoreView } from './AccuracyMoreView.tsx'
import { AccuracyPanels } from './AccuracyPanels.tsx'
import { AgreementPanels } from './AgreementPanels.tsx'
import { CorrelationPanels } from './CorrelationPanels.tsx'
import { countedNotes } from './countedNotes.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { PrecisionPanels } from './PrecisionPanels.tsx'
import { RepeatCheck } from './RepeatCheck.tsx'
import { readingNotes } from './readingNotes.ts'
import { StandingFacts } from './StandingFacts.tsx'
import { StoredComparison } from './StoredComparison.tsx'
import { StoredPanel } from './StoredPanel.tsx'

type StoredAnalysisProps = {
  analysis: Analysis
  /** The frozen values or pairs that the figures draw; absent while they load. */
  values: DatasetValues | undefined
  pairs: DatasetPairs | undefined
  provenance: readonly string[]
  mayRepeat: boolean
}

/** A stored analysis: exactly the numbers that were stored. */
export function StoredAnalysis(props: StoredAnalysisProps) {
  const { analysis, values, pairs, provenance } = props
  return (
    <Sheet label="About this analysis" margin={<Margin {...props} />}>
      <StoredResult analysis={analysis} values={values} pairs={pairs} provenance={provenance} />
    </Sheet>
  )
}

function StoredResult(props: Omit<StoredAnalysisProps, 'mayRepeat'>) {
  const { analysis, values, pairs, provenance } = props
  const { result, parameters } = analysis
  if (result.kind === 'accuracy')
    return <StoredAccuracy analysis={analysis} values={values} provenance={provenance} />
  if (result.kind === 'agreement')
    return <StoredAgreement analysis={analysis} pairs={pairs} provenance={provenance} />
  if (result.kind === 'comparison' && parameters.kind === 'comparison')
    return <StoredComparison result={result} parameters={parameters} provenance={provenance} />
  if (result.kind === 'panel' && parameters.kind === 'panel')
    return <StoredPanel result={result} parameters={parameters} />
  if (result.kind === 'precision' && parameters.kind === 'precision')
    return <PrecisionPanels result={result} parameters={parameters} />
  if (result.kind === 'correlation')
    return <CorrelationPanels figures={result} {...result} confidence={parameters.confidence} />
  return null
}

function StoredAccuracy(props: Pick<StoredAnalysisProps, 'analysis' | 'values' | 'provenance'>) {
  const { result, parameters } = props.analysis
  if (result.kind !== 'accuracy' || parameters.kind !== 'accuracy') return null
  return (
    <>
      <AccuracyPanels
        shown={{
          analyteName: result.analyteName,
          unit: unitLabel(result.unit),
          direction: parameters.direction,
          confidence: parameters.confidence,
          prevalence: parameters.prevalence,
          plannedCutOff: result.plannedCutOff,
          overall: result,
          atCutOff: result.atCutOff,
        }}
        values={props.values}
        provenance={props.provenance}
      />
      <AccuracyMoreView result={result} />
    </>
  )
}

function StoredAgreement(props: Pick<StoredAnalysisProps, 'analysis' | 'pairs' | 'provenance'>) {
  const { pairs } = props
  const { result, parameters } = props.analysis
  const shown = useMemo(
    () =>
      result.kind === 'agreement' && parameters.kind === 'agreement' && pairs
        ? {
            analyteName: result.analyteName,
            unit: unitLabel(result.unit),
            confidence: parameters.confidence,
            errorVarianceRatio: parameters.errorVarianceRatio,
            figures: result,
            pairs,
          }
        : null,
    [result, parameters, pairs],
  )
  if (!shown) return <Skeleton lines={10} />
  return <AgreementPanels shown={shown} provenance={props.provenance} />
}

function intervalMethod(result: Analysis['result']): string | null {
  switch (result.kind) {
    case 'accuracy':
      return result.area?.method ?? null
    case 'agreement':
      return result.limitsMethod
    case 'precision':
      return result.withinSubjectSd.method
    case 'correlation':
      return result.rankCorrelation.method
    case 'comparison':
      return result.curves[0]?.area?.method ?? null
    default:
      return null
  }
}

function Margin({ analysis, mayRepeat }: StoredAnalysisProps) {
  const { result, parameters } = analysis
  const method = intervalMethod(result)
  const interval = method && `${method}, ${levelWords(parameters.confidence)}`
  return (
    <>
      <StandingFacts
        caution={analysis.caution}
        dataset={{ ...analysis, hash: analysis.datasetHash }}
        counted={<Counted analysis={analysis} />}
        {...('present' in result.counts ? { reference: analysis.referenceStandard } : {})}
        {...(interval ? { interval } : {})}
        run={
          <>
            <InstantText at={analysis.runAt} /> by {analysis.runByName}
            <br />
            statistics {analysis.statisticsVersion}
          </>
        }
        more={[
          {
            term: 'Stored result',
            value: <CopyableHash value={analysis.resultHash} label="hash of the stored result" />,
          },
          { term: 'Standing', value: EARLIER_DATA_BADGE_REASON },
        ]}
      />
      {mayRepeat && <RepeatCheck analysisId={analysis.id} />}
    </>
  )
}

function Counted({ analysis: { result, parameters } }: { analysis: Analysis }): ReactNode {
  const { counts } = result
  return (
    <LeftOutList
      subjects={counts.subjects}
      counted={'counted' in counts ? counts.counted : counts.present + counts.absent}
      leftOut={counts.leftOut}
      notes={
        'sessionRule' in parameters
          ? countedNotes(counts, parameters.sessionRule)
          : 'pairs' in counts
            ? readingNotes(counts)
            : []
      }
    />
  )
}
