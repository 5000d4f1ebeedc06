import { type ReactNode, useMemo, useState } from 'react'
import { agreementFiguresOf } from '#shared/analyses/agreementFiguresOf.ts'
import { lineUnit } from '#shared/analyses/agreementTables.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import type { AgreementFigures, AgreementParameters } from '#shared/schemas/agreement.ts'
import type { Dataset, DatasetPairs } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { SCALE_UNITS } from '#shared/terms/agreementTerms.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { AcceptanceBoxes } from './AcceptanceBoxes.tsx'
import { AgreementChoices } from './AgreementChoices.tsx'
import { AgreementPanels } from './AgreementPanels.tsx'
import { type AgreementChoice, firstChoice } from './agreementChoice.ts'
import { countedNotes } from './countedNotes.ts'
import type { ExplorerSettings } from './explorerSettings.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { LevelsBox } from './LevelsBox.tsx'
import { NumberBox } from './NumberBox.tsx'
import { StandingFacts } from './StandingFacts.tsx'

type AgreementExplorerProps = {
  dataset: Dataset
  pairs: DatasetPairs
  settings: ExplorerSettings
  provenance: readonly string[]
  toolbar: ReactNode
  /** The store button for the settings as they are now. */
  store: (parameters: AgreementParameters) => ReactNode
}

const CONFIDENCE = 0.95

/** Compares sensor and reference analyser on frozen pairs, all of it in the browser. */
export function AgreementExplorer(props: AgreementExplorerProps) {
  const { dataset, pairs, settings, provenance, toolbar, store } = props
  const { analyteKey, sessionRule } = settings
  const planned = dataset.protocol.acceptanceLimits.find((each) => each.analyteKey === analyteKey)
  const [choice, setChoice] = useState(() => firstChoice(planned))
  const change = (changes: Partial<AgreementChoice>) =>
    setChoice((before) => after(before, changes, planned))
  const parameters = useMemo(
    () => parametersOf(choice, { analyteKey, sessionRule }),
    [choice, analyteKey, sessionRule],
  )
  const found = useMemo(() => attempt(pairs, parameters), [pairs, parameters])
  const { counts } = pairs
  const unit = unitLabel(pairs.unit)
  const analyteName = dataset.manifest.analytes.find((each) => each.key === analyteKey)?.name ?? ''
  const { errorVarianceRatio, scale } = choice
  const shown = useMemo(
    () =>
      found.figures && {
        analyteName,
        unit,
        confidence: CONFIDENCE,
        errorVarianceRatio,
        figures: found.figures,
        pairs,
      },
    [found, analyteName, unit, errorVarianceRatio, pairs],
  )
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
                counted={counts.counted}
                leftOut={counts.leftOut}
                notes={countedNotes(counts, sessionRule)}
              />
            }
            {...(found.figures
              ? { interval: `${found.figures.limitsMethod}, ${levelWords(CONFIDENCE)}` }
              : {})}
            run="Explored in this browser, not stored"
          />
        }
      >
        {toolbar}
        <AgreementChoices
          choice={choice}
          onChange={change}
          clustered={sessionRule === 'every' && counts.severalSessions > 0}
        />
        {shown ? (
          <AgreementPanels
            shown={shown}
            provenance={provenance}
            limitsSettings={
              <AcceptanceBoxes
                key={SCALE_UNITS[scale]}
                choice={choice}
                onChange={change}
                unit={lineUnit(shown.figures, unit)}
                planned={planned !== undefined && SCALE_UNITS[scale] === null}
              />
            }
            linesSettings={<LineSettings choice={choice} onChange={change} unit={unit} />}
          />
        ) : (
          <Notice tone="warn" title="The figures cannot be computed from these data">
            {found.problem}
          </Notice>
        )}
      </Sheet>
      {found.figures && store(parameters)}
    </>
  )
}

/** Limits in another unit are other limits, so a change of unit takes them back to what is planned. */
function after(
  before: AgreementChoice,
  changes: Partial<AgreementChoice>,
  planned: { lower: number; upper: number } | undefined,
): AgreementChoice {
  const next = { ...before, ...changes }
  const unit = SCALE_UNITS[next.scale]
  if (unit === SCALE_UNITS[before.scale]) return next
  const { lower, upper } = firstChoice(unit === null ? planned : undefined)
  return { ...next, lower, upper }
}

function parametersOf(
  { lower, upper, ...choice }: AgreementChoice,
  of: Pick<AgreementParameters, 'analyteKey' | 'sessionRule'>,
): AgreementParameters {
  const usable = lower !== null && upper !== null && lower < upper
  return {
    kind: 'agreement',
    ...of,
    referenceKey: null,
    confidence: CONFIDENCE,
    ...choice,
    acceptance: usable ? { lower, upper } : null,
  }
}

function LineSettings(props: {
  choice: AgreementChoice
  onChange: (changes: Partial<AgreementChoice>) => void
  unit: string
}) {
  const { choice, onChange, unit } = props
  return (
    <div className="flex flex-wrap gap-x-8 gap-y-3">
      <NumberBox
        label="Error variance of the sensor ÷ of the reference"
        value={choice.errorVarianceRatio}
        onChange={(value) => value !== null && onChange({ errorVarianceRatio: value })}
        refuse={(value) => (value > 0 ? null : 'Must lie above 0.')}
      />
      <LevelsBox
        unit={unit}
        levels={choice.decisionLevels}
        onChange={(decisionLevels) => onChange({ decisionLevels })}
      />
    </div>
  )
}

type Attempt = { figures: AgreementFigures; problem?: never } | { figures: null; problem: string }

function attempt(pairs: DatasetPairs, at: AgreementParameters): Attempt {
  try {
    return { figures: agreementFiguresOf(pairs, at) }
  } catch (error) {
    if (error instanceof StatisticsError) return { figures: null, problem: refusalSentence(error) }
    throw error
  }
}
