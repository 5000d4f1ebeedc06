import type { ReactNode } from 'react'
import { refusalSentence } from '#shared/analyses/refusalSentence.ts'
import { requireSameMeasurand } from '#shared/analyses/sameMeasurand.ts'
import type { Dataset } from '#shared/schemas/dataset.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { Button } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import type { ExplorerSettings } from './explorerSettings.ts'
import { StandingFacts } from './StandingFacts.tsx'

type OtherMeasurandProps = {
  dataset: Dataset
  settings: ExplorerSettings
  toolbar: ReactNode
  onChange: (changes: Partial<ExplorerSettings>) => void
}

/** Why two different measurands have no agreement, and the way to what can be said of them. */
export function OtherMeasurand({ dataset, settings, toolbar, onChange }: OtherMeasurandProps) {
  const { analyteKey, referenceKey } = settings
  const rule = settings.sessionRule === 'every' ? 'first' : settings.sessionRule
  return (
    <Sheet
      label="About this exploration"
      margin={<StandingFacts caution={dataset.caution} dataset={dataset} />}
    >
      {toolbar}
      <Notice tone="warn" title="No agreement between different measurands">
        <p>{reasonOf(dataset, settings)}</p>
        <div className="mt-3 flex flex-wrap gap-3">
          <Button
            onClick={() => onChange({ kind: 'correlation', sessionRule: rule, referenceKey })}
          >
            Look at the rank correlation
          </Button>
          <Button kind="quiet" onClick={() => onChange({ referenceKey: analyteKey })}>
            Compare with the same analyte
          </Button>
        </div>
      </Notice>
    </Sheet>
  )
}

function reasonOf({ manifest }: Dataset, { analyteKey, referenceKey }: ExplorerSettings): string {
  const named = (key: string) => manifest.analytes.find((analyte) => analyte.key === key)
  const sensor = named(analyteKey)
  const reference = named(referenceKey)
  try {
    if (sensor && reference) requireSameMeasurand(sensor, reference)
  } catch (error) {
    if (error instanceof StatisticsError) return refusalSentence(error)
    throw error
  }
  return ''
}
