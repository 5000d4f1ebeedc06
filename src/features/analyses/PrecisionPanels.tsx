import type { ReactNode } from 'react'
import {
  intraclassTable,
  noiseTable,
  precisionTable,
  sessionsWords,
} from '#shared/analyses/precisionTables.ts'
import type { PrecisionParameters, PrecisionResult } from '#shared/schemas/precision.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { agreementDecimals, lineTexts, withUnit } from '#shared/terms/resultText.ts'
import { ResultTableView } from './ResultTableView.tsx'

type PrecisionPanelsProps = {
  result: PrecisionResult
  parameters: PrecisionParameters
  /** Settings above the costs, while exploring. */
  settings?: ReactNode
}

/** How readings repeat from session to session, and what their noise costs an area. */
export function PrecisionPanels({ result, parameters, settings }: PrecisionPanelsProps) {
  const { withinSubjectSd, caveats } = result
  const { confidence, reliabilityWanted } = parameters
  const decimals = agreementDecimals(withinSubjectSd.estimate)
  const { estimate, interval } = lineTexts(withinSubjectSd, decimals)
  return (
    <>
      <h2>
        Within-subject SD {withUnit(estimate, unitLabel(result.unit))}{' '}
        <span className="font-normal text-ink-2">({interval})</span>
      </h2>
      <div className="grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <section aria-label="Repeatability" className="min-w-0">
          <ResultTableView table={precisionTable(result, confidence)} />
          {caveats.map((caveat) => (
            <p key={caveat} className="mt-3 text-sm">
              {caveat}
            </p>
          ))}
        </section>
        <section aria-label="Intraclass correlations" className="min-w-0">
          <ResultTableView table={intraclassTable(result, confidence)} />
        </section>
      </div>
      <section aria-label="What the noise costs" className="mt-7 min-w-0 max-w-[640px]">
        <h2>What the noise costs</h2>
        {settings}
        <p className="my-3">{sessionsWords(result, reliabilityWanted)}</p>
        <ResultTableView table={noiseTable(result)} />
      </section>
    </>
  )
}
