import { type ReactNode, useMemo, useState } from 'react'
import { agreementFiguresOf } from '#shared/analyses/agreementFiguresOf.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import type { AgreementFigures, AgreementParameters } from '#shared/schemas/analysis.ts'
import type { Dataset, DatasetPairs } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { AgreementPanels } from './AgreementPanels.tsx'
import { countedNotes } from './countedNotes.ts'
import type { ExplorerSettings } from './explorerSettings.ts'
import { LeftOutList } from './LeftOutList.tsx'
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
  const [lower, setLower] = useState<number | null>(planned?.lower ?? null)
  const [upper, setUpper] = useState<number | null>(planned?.upper ?? null)
  const usable = lower !== null && upper !== null && lower < upper
  const acceptance = useMemo(() => (usable ? { lower, upper } : null), [usable, lower, upper])
  const found = useMemo(
    () => attempt(pairs, { sessionRule, confidence: CONFIDENCE, acceptance }),
    [pairs, sessionRule, acceptance],
  )
  const { counts } = pairs
  const unit = unitLabel(pairs.unit)
  const analyteName = dataset.manifest.analytes.find((each) => each.key === analyteKey)?.name ?? ''
  const shown = useMemo(
    () =>
      found.figures && {
        analyteName,
        unit,
        confidence: CONFIDENCE,
        figures: found.figures,
        pairs,
      },
    [found, analyteName, unit, pairs],
  )
  const limits = (
    <fieldset className="mt-5 space-y-3">
      <legend className="sr-only">Acceptance limits</legend>
      <div className="flex flex-wrap gap-x-6 gap-y-3">
        <NumberBox
          label="Acceptable from"
          value={lower}
          onChange={setLower}
          refuse={(value) =>
            upper !== null && value >= upper ? 'Must lie below the upper limit.' : null
          }
        />
        <NumberBox
          label="up to"
          unit={unit}
          value={upper}
          onChange={setUpper}
          refuse={(value) =>
            lower !== null && value <= lower ? 'Must lie above the lower limit.' : null
          }
        />
      </div>
      <p className="text-sm text-ink-2">
        {planned
          ? 'Filled in from the protocol. With other limits the analysis differs from it.'
          : 'The protocol states none for this analyte. Limits chosen after the data were seen prove nothing.'}
      </p>
    </fieldset>
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
        {shown ? (
          <AgreementPanels shown={shown} provenance={provenance}>
            {limits}
          </AgreementPanels>
        ) : (
          <Notice tone="warn" title="The figures cannot be computed from these data">
            {found.problem}
          </Notice>
        )}
      </Sheet>
      {found.figures &&
        store({ kind: 'agreement', analyteKey, sessionRule, confidence: CONFIDENCE, acceptance })}
    </>
  )
}

type Attempt = { figures: AgreementFigures; problem?: never } | { figures: null; problem: string }

function attempt(pairs: DatasetPairs, at: Parameters<typeof agreementFiguresOf>[1]): Attempt {
  try {
    return { figures: agreementFiguresOf(pairs, at) }
  } catch (error) {
    if (error instanceof StatisticsError) return { figures: null, problem: refusalSentence(error) }
    throw error
  }
}
