import { type ReactNode, useCallback, useId, useMemo } from 'react'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import { differencePairsTable } from '#shared/figures/differencePlotTable.ts'
import type { DifferencePlotData } from '#shared/figures/differencePlotTypes.ts'
import { ScatterIdentity } from '#shared/figures/ScatterIdentity.tsx'
import { scatterIdentityTable } from '#shared/figures/scatterIdentityTable.ts'
import { agreementDecimals, lineTexts, withUnit } from '#shared/terms/resultText.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import type { AgreementShown } from './agreementShown.ts'
import { LimitsTable } from './LimitsTable.tsx'

type AgreementPanelsProps = {
  shown: AgreementShown
  provenance: readonly string[]
  /** Settings under the table of limits, while exploring. */
  children?: ReactNode
}

/** Differences against means with bias and limits, their table, and sensor against reference. */
export function AgreementPanels({ shown, provenance, children }: AgreementPanelsProps) {
  const id = useId()
  const { bias, sd } = shown.figures
  const { estimate, interval } = lineTexts(bias, agreementDecimals(sd))
  return (
    <>
      <section aria-labelledby={`${id}-bias`} className="min-w-0">
        <h2 id={`${id}-bias`}>
          Bias {withUnit(estimate, shown.unit)}{' '}
          <span className="font-normal text-ink-2">({interval})</span>
        </h2>
        <Differences shown={shown} provenance={provenance} />
      </section>
      <div className="mt-7 grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <section aria-labelledby={`${id}-limits`} className="min-w-0">
          <h2 id={`${id}-limits`}>Limits of agreement</h2>
          <LimitsTable figures={shown.figures} unit={shown.unit} confidence={shown.confidence} />
          {children}
        </section>
        <Scatter shown={shown} provenance={provenance} />
      </div>
    </>
  )
}

function Differences({ shown, provenance }: AgreementPanelsProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 300, most: 980, first: 680 })
  const plot = useMemo(() => plotOf(shown), [shown])
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

function Scatter({ shown, provenance }: AgreementPanelsProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLElement>({ least: 280, most: 520, first: 470 })
  const { sensor, reference, subjects } = shown.pairs
  const { unit } = shown
  const pairs = useMemo(
    () =>
      sensor.map((value, at) => ({
        sensor: value,
        reference: reference[at]!,
        subject: subjects[at]!,
      })),
    [sensor, reference, subjects],
  )
  const table = useCallback(() => scatterIdentityTable({ pairs, unit }), [pairs, unit])
  return (
    <section aria-labelledby={`${id}-scatter`} ref={ref} className="min-w-0">
      <h2 id={`${id}-scatter`}>Sensor against reference</h2>
      <div style={{ maxWidth: width }}>
        <ScatterIdentity
          id={`${id}-identity`}
          pairs={pairs}
          unit={unit}
          width={width}
          theme={theme}
        />
      </div>
      <FigureNumbers
        summary="Both readings in numbers"
        table={table}
        provenance={provenance}
        fileName="sensor-and-reference"
      />
    </section>
  )
}

function plotOf({ pairs, figures, unit }: AgreementShown): DifferencePlotData {
  const { sensor, reference, subjects } = pairs
  const line = ({ estimate, lower, upper }: typeof figures.bias) => ({
    intercept: estimate,
    interval: { lower, upper },
  })
  return {
    pairs: sensor.map((value, at) => ({
      mean: (value + reference[at]!) / 2,
      difference: value - reference[at]!,
      subject: subjects[at]!,
    })),
    bias: line(figures.bias),
    lowerLimit: line(figures.lowerLimit),
    upperLimit: line(figures.upperLimit),
    unit,
    ...(figures.acceptance ? { acceptance: figures.acceptance } : {}),
  }
}
