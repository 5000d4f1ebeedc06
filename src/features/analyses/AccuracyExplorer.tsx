import { type ReactNode, useMemo, useState } from 'react'
import { accuracyAtCutOffOf } from '#shared/analyses/accuracyAtCutOffOf.ts'
import { accuracyOverallOf } from '#shared/analyses/accuracyOverallOf.ts'
import { moreOnAreaOf } from '#shared/analyses/moreOnAreaOf.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import type { AccuracyOptions } from '#shared/schemas/accuracyMore.ts'
import type { AccuracyOverall, AccuracyParameters } from '#shared/schemas/analysis.ts'
import type { Dataset, DatasetValues } from '#shared/schemas/dataset.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { AccuracyOptionsPanel, USUAL_OPTIONS } from './AccuracyOptionsPanel.tsx'
import { AccuracyPanels } from './AccuracyPanels.tsx'
import { countedNotes } from './countedNotes.ts'
import { ExploredCutOffs } from './ExploredCutOffs.tsx'
import { type ExplorerSettings, plannedCutOffOf } from './explorerSettings.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { MoreOnArea } from './MoreOnArea.tsx'
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
  const [options, setOptions] = useState(USUAL_OPTIONS)
  const more = useMemo(() => {
    const area = overall.figures?.area
    if (!area || !options.partialArea) return null
    return moreOnAreaOf(values, rocCurve({ ...values, direction }), area, options.partialArea)
  }, [values, overall, direction, options.partialArea])
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
        {overall.figures && (
          <>
            <ExploredCutOffs
              rules={overall.figures.rules}
              values={values}
              direction={direction}
              resampling={options.resampling}
              unit={unitLabel(values.unit)}
            />
            {more && <MoreOnArea found={more} />}
            <AccuracyOptionsPanel
              options={options}
              onChange={(changes) => setOptions((before) => ({ ...before, ...changes }))}
              unit={unitLabel(values.unit)}
            />
          </>
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
          ...usable(options, overall.figures, values),
        })}
    </>
  )
}

/** What makes no sense for these data is left out: corrections without cut-offs, one value of several. */
function usable(
  options: AccuracyOptions,
  { area }: AccuracyOverall,
  { presentSubjects }: DatasetValues,
): AccuracyOptions {
  const clustered = presentSubjects !== null
  return {
    ...options,
    resampling:
      area && (!clustered || options.areaInterval === 'bootstrap') ? options.resampling : null,
    ...(area ? {} : { areaInterval: 'delong', partialArea: null }),
    ...(clustered ? { troubledResults: null, subgroups: [] } : {}),
  }
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
