import { type ReactNode, useMemo, useState } from 'react'
import { accuracyAtCutOffOf } from '#shared/analyses/accuracyAtCutOffOf.ts'
import { accuracyOverallOf } from '#shared/analyses/accuracyOverallOf.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import type { AccuracyOverall, AccuracyParameters } from '#shared/schemas/analysis.ts'
import type { Dataset, DatasetValues } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { AccuracyPanels } from './AccuracyPanels.tsx'
import { countedNotes } from './countedNotes.ts'
import { type ExplorerSettings, plannedCutOffOf } from './explorerSettings.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { NumberBox } from './NumberBox.tsx'
import { StandingFacts } from './StandingFacts.tsx'

type AccuracyExplorerProps = {
  dataset: Dataset
  values: DatasetValues
  settings: ExplorerSettings
  provenance: readonly string[]
  toolbar: ReactNode
  /** The store button for the settings as they are now. */
  store: (parameters: AccuracyParameters) => ReactNode
}

const CONFIDENCE = 0.95

/** Moves a cut-off over frozen values, all of it in the browser; nothing is stored by looking. */
export function AccuracyExplorer(props: AccuracyExplorerProps) {
  const { dataset, values, settings, provenance, toolbar, store } = props
  const { direction, analyteKey, sessionRule } = settings
  const { sampling } = dataset.protocol
  const planned = plannedCutOffOf(dataset, settings)
  const overall = useMemo(() => attempt(values, direction), [values, direction])
  const [chosen, setChosen] = useState<number | null>(null)
  const [prevalence, setPrevalence] = useState<number | null>(null)
  const cutOff = chosen ?? planned ?? firstCutOff(overall.figures) ?? 0
  const atCutOff = useMemo(
    () =>
      overall.figures &&
      accuracyAtCutOffOf(values, cutOff, {
        direction,
        confidence: CONFIDENCE,
        prevalence,
        sampling,
      }),
    [overall, values, cutOff, direction, prevalence, sampling],
  )
  const { counts } = values
  return (
    <>
      <Sheet
        label="About this exploration"
        margin={
          <StandingFacts
            caution={dataset.caution}
            dataset={dataset}
            counted={
              <LeftOutList
                subjects={counts.subjects}
                counted={counts.present + counts.absent}
                leftOut={counts.leftOut}
                notes={countedNotes(counts, sessionRule)}
              />
            }
            reference={dataset.protocol.referenceStandard}
            {...(overall.figures?.area
              ? { interval: `${overall.figures.area.method}, ${levelWords(CONFIDENCE)}` }
              : {})}
            run="Explored in this browser, not stored"
          />
        }
      >
        {toolbar}
        {overall.figures && atCutOff ? (
          <AccuracyPanels
            shown={{
              analyteName:
                dataset.manifest.analytes.find((each) => each.key === analyteKey)?.name ?? '',
              unit: unitLabel(values.unit),
              direction,
              confidence: CONFIDENCE,
              prevalence,
              plannedCutOff: planned,
              overall: overall.figures,
              atCutOff,
            }}
            values={values}
            provenance={provenance}
            onCutOff={setChosen}
          >
            <div className="mt-4">
              <NumberBox
                label="Predictive values at a prevalence of"
                value={prevalence}
                onChange={setPrevalence}
                refuse={(value) =>
                  value > 0 && value < 1 ? null : 'Between 0 and 1, such as 0.2.'
                }
              />
            </div>
          </AccuracyPanels>
        ) : (
          <Notice tone="warn" title="The figures cannot be computed from these data">
            {overall.problem}
          </Notice>
        )}
      </Sheet>
      {overall.figures &&
        store({
          kind: 'accuracy',
          analyteKey,
          direction,
          sessionRule,
          cutOff,
          confidence: CONFIDENCE,
          prevalence,
        })}
    </>
  )
}

type Attempt = { figures: AccuracyOverall; problem?: never } | { figures: null; problem: string }

function attempt(values: DatasetValues, direction: ExplorerSettings['direction']): Attempt {
  try {
    return { figures: accuracyOverallOf(values, { direction, confidence: CONFIDENCE }) }
  } catch (error) {
    if (error instanceof StatisticsError) return { figures: null, problem: refusalSentence(error) }
    throw error
  }
}

/** Where the mark stands when the protocol plans no cut-off: the first that a rule or the data give. */
function firstCutOff(overall: AccuracyOverall | null): number | null {
  if (!overall) return null
  const [rule] = overall.rules
  const thresholds = overall.curve.thresholds
  return rule?.cutOffs[0]?.threshold ?? thresholds[Math.floor(thresholds.length / 2)] ?? null
}
