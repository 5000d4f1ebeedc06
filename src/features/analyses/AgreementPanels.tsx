import { type ReactNode, useCallback, useId, useMemo } from 'react'
import { lineUnit } from '#shared/analyses/agreementTables.ts'
import { differencePlotOf } from '#shared/analyses/differencePlotOf.ts'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import { differencePairsTable } from '#shared/figures/differencePlotTable.ts'
import { MIDDLE_LINE_LABELS } from '#shared/terms/agreementTerms.ts'
import { agreementDecimals, lineTexts, withUnit } from '#shared/terms/resultText.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import type { AgreementShown } from './agreementShown.ts'
import { LimitsTable } from './LimitsTable.tsx'
import { MethodComparisonPanels } from './MethodComparisonPanels.tsx'
import { OutsideList } from './OutsideList.tsx'

type AgreementPanelsProps = {
  shown: AgreementShown
  provenance: readonly string[]
  /** Settings beside the table of limits, and above the lines, while exploring. */
  limitsSettings?: ReactNode
  linesSettings?: ReactNode
}

/** Differences against means with their limits, the table of these, and sensor against reference. */
export function AgreementPanels(props: AgreementPanelsProps) {
  const { shown, provenance, limitsSettings, linesSettings } = props
  const id = useId()
  const { bias, sd, scale } = shown.figures
  const { estimate, interval } = lineTexts(bias, agreementDecimals(sd))
  return (
    <>
      <section aria-labelledby={`${id}-bias`} className="min-w-0">
        <h2 id={`${id}-bias`}>
          {MIDDLE_LINE_LABELS[scale]} {withUnit(estimate, lineUnit(shown.figures, shown.unit))}{' '}
          <span className="font-normal text-ink-2">({interval})</span>
        </h2>
        <Differences shown={shown} provenance={provenance} />
      </section>
      <div className="mt-7 grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <section aria-labelledby={`${id}-limits`} className="min-w-0">
          <h2 id={`${id}-limits`}>Limits of agreement</h2>
          <LimitsTable figures={shown.figures} unit={shown.unit} confidence={shown.confidence} />
        </section>
        <div className="min-w-0">
          {limitsSettings}
          <OutsideList shown={shown} />
        </div>
      </div>
      <MethodComparisonPanels shown={shown} provenance={provenance} settings={linesSettings} />
    </>
  )
}

function Differences({ shown, provenance }: Pick<AgreementPanelsProps, 'shown' | 'provenance'>) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 300, most: 980, first: 680 })
  const { pairs, figures, unit } = shown
  const plot = useMemo(() => differencePlotOf(pairs, figures, unit), [pairs, figures, unit])
  const table = useCallback(() => differencePairsTable(plot), [plot])
  return (
    <div ref={ref}>
      <div style={{ maxWidth: width }}>
        <DifferencePlot id={`${id}-differences`} {...plot} width={width} theme={theme} />
      </div>
      <FigureNumbers
        summary="The pairs in numbers"
        table={table}
        provenance={provenance}
        fileName="differences"
      />
    </div>
  )
}
