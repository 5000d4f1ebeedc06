import { type ReactNode, useMemo } from 'react'
import { rankCorrelationOf } from '#shared/analyses/correlationResultOf.ts'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import type { CorrelationParameters, CorrelationResult } from '#shared/schemas/agreement.ts'
import type { Dataset, DatasetPairs } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { levelWords } from '#shared/terms/resultText.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { CorrelationPanels } from './CorrelationPanels.tsx'
import { countedNotes } from './countedNotes.ts'
import { LeftOutList } from './LeftOutList.tsx'
import { StandingFacts } from './StandingFacts.tsx'

type CorrelationExplorerProps = {
  dataset: Dataset
  pairs: DatasetPairs
  toolbar: ReactNode
  /** The store button for the settings as they are now. */
  store: (parameters: CorrelationParameters) => ReactNode
}

const CONFIDENCE = 0.95
const ONE_EACH =
  'A rank correlation takes one pair of each subject. Choose the first session, or the mean or median of each subject.'

/** Sensor and reference ranks side by side, in the browser; the measurands may differ. */
export function CorrelationExplorer({ dataset, pairs, toolbar, store }: CorrelationExplorerProps) {
  const { counts, sessionRule, analyteKey, referenceKey } = pairs
  const found = useMemo(() => attempt(pairs), [pairs])
  const nameOf = (key: string) =>
    dataset.manifest.analytes.find((analyte) => analyte.key === key)?.name ?? ''
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
              ? {
                  interval: `${found.figures.rankCorrelation.method}, ${levelWords(CONFIDENCE)}`,
                }
              : {})}
            run="Explored in this browser, not stored"
          />
        }
      >
        {toolbar}
        {found.figures ? (
          <CorrelationPanels
            figures={found.figures}
            analyteName={nameOf(analyteKey)}
            referenceName={nameOf(referenceKey)}
            confidence={CONFIDENCE}
          />
        ) : (
          <Notice tone="warn" title="The figures cannot be computed from these data">
            {found.problem}
          </Notice>
        )}
      </Sheet>
      {found.figures &&
        sessionRule !== 'every' &&
        store({
          kind: 'correlation',
          analyteKey,
          referenceKey,
          sessionRule,
          confidence: CONFIDENCE,
        })}
    </>
  )
}

type Figures = Pick<CorrelationResult, 'rankCorrelation' | 'p'>
type Attempt = { figures: Figures; problem?: never } | { figures: null; problem: string }

function attempt(pairs: DatasetPairs): Attempt {
  if (pairs.sessionRule === 'every') return { figures: null, problem: ONE_EACH }
  try {
    return { figures: rankCorrelationOf(pairs, CONFIDENCE) }
  } catch (error) {
    if (error instanceof StatisticsError) return { figures: null, problem: refusalSentence(error) }
    throw error
  }
}
