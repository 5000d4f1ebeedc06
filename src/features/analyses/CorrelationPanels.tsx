import { correlationTable } from '#shared/analyses/correlationTable.ts'
import type { CorrelationResult } from '#shared/schemas/agreement.ts'
import { formatEstimate, formatInterval } from '#shared/terms/numbers.ts'
import { ResultTableView } from './ResultTableView.tsx'

type CorrelationPanelsProps = {
  figures: Pick<CorrelationResult, 'rankCorrelation' | 'p'>
  analyteName: string
  referenceName: string
  confidence: number
}

/** Rank correlation of two measurands. */
export function CorrelationPanels(props: CorrelationPanelsProps) {
  const { figures, analyteName, referenceName, confidence } = props
  const { estimate, lower, upper } = figures.rankCorrelation
  return (
    <section aria-label="Rank correlation" className="min-w-0 max-w-[640px]">
      <h2>
        Rank correlation {formatEstimate(estimate)}{' '}
        <span className="font-normal text-ink-2">({formatInterval(lower, upper)})</span>
      </h2>
      <p className="mb-3 text-ink-2">
        {analyteName} by the sensor, {referenceName} by the reference analyser
      </p>
      <ResultTableView table={correlationTable(figures, confidence)} />
    </section>
  )
}
