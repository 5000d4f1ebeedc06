import { type ReactNode, useCallback, useId, useMemo, useState } from 'react'
import {
  correlationsTable,
  fittedLinesTable,
  levelsTable,
} from '#shared/analyses/comparisonTables.ts'
import { residualPlotOf } from '#shared/analyses/residualPlotOf.ts'
import { type ScatterFit, scatterFitOf } from '#shared/analyses/scatterFitOf.ts'
import { DifferencePlot } from '#shared/figures/DifferencePlot.tsx'
import { differencePairsTable } from '#shared/figures/differencePlotTable.ts'
import { ScatterIdentity } from '#shared/figures/ScatterIdentity.tsx'
import { scatterIdentityTable } from '#shared/figures/scatterIdentityTable.ts'
import { FITTED_LINE_LABELS, FITTED_LINES, type FittedLine } from '#shared/terms/agreementTerms.ts'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { Segments } from '../../ui/Segments.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import type { AgreementShown } from './agreementShown.ts'
import { ResultTableView } from './ResultTableView.tsx'

type PanelsProps = { shown: AgreementShown; provenance: readonly string[]; settings?: ReactNode }
type PlotProps = Pick<PanelsProps, 'shown' | 'provenance'> & { fit: ScatterFit | null }

const NOT_FITTED = 'That line could not be fitted; the table below says why.'
const STORED_WITHOUT =
  'This analysis was stored by a build that fitted no lines. Explore it again to see them.'

const LINE_OPTIONS = FITTED_LINES.map((value) => ({ value, label: FITTED_LINE_LABELS[value] }))

/** Sensor against reference with a line and its residuals, the lines, bias at levels, correlations. */
export function MethodComparisonPanels({ shown, provenance, settings }: PanelsProps) {
  const id = useId()
  const [line, setLine] = useState<FittedLine>('deming')
  const { figures, unit, confidence, errorVarianceRatio } = shown
  const { comparison, comparisonWithheld } = figures
  const fit = useMemo(() => comparison && scatterFitOf(comparison, line), [comparison, line])
  const at = { unit, confidence, errorVarianceRatio }
  return (
    <section aria-labelledby={id} className="mt-8 min-w-0">
      <h2 id={id}>Sensor against reference</h2>
      {comparison && (
        <div className="mb-4">
          <Segments label="Line drawn" options={LINE_OPTIONS} value={line} onChange={setLine} />
        </div>
      )}
      <div className="grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <Scatter shown={shown} provenance={provenance} fit={fit} />
        {comparison && fit ? (
          <Residuals shown={shown} provenance={provenance} fit={fit} />
        ) : (
          <p className="text-sm">
            {comparison ? NOT_FITTED : (comparisonWithheld ?? STORED_WITHOUT)}
          </p>
        )}
      </div>
      {comparison && (
        <div className="mt-6 space-y-6">
          <ResultTableView table={fittedLinesTable(comparison, at)} />
          {settings}
          <ResultTableView table={levelsTable(comparison, at)} />
          <ResultTableView table={correlationsTable(comparison, confidence)} />
        </div>
      )}
    </section>
  )
}

function Scatter({ shown, provenance, fit }: PlotProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 520, first: 470 })
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
    <div ref={ref} className="min-w-0">
      <div style={{ maxWidth: width }}>
        <ScatterIdentity
          id={`${id}-identity`}
          pairs={pairs}
          unit={unit}
          width={width}
          theme={theme}
          {...(fit ? { fit } : {})}
        />
      </div>
      <FigureNumbers
        summary="Both readings in numbers"
        table={table}
        provenance={provenance}
        fileName="sensor-and-reference"
      />
    </div>
  )
}

function Residuals({ shown, provenance, fit }: PlotProps & { fit: ScatterFit }) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 520, first: 470 })
  const { pairs, unit } = shown
  const plot = useMemo(() => residualPlotOf(pairs, fit, unit), [pairs, fit, unit])
  const table = useCallback(
    () => ({ ...differencePairsTable(plot), caption: `Residuals of the ${fit.label} line` }),
    [plot, fit],
  )
  return (
    <div ref={ref} className="min-w-0">
      <div style={{ maxWidth: width }}>
        <DifferencePlot id={`${id}-residuals`} {...plot} width={width} theme={theme} />
      </div>
      <FigureNumbers
        summary="Residuals in numbers"
        table={table}
        provenance={provenance}
        fileName="residuals"
      />
    </div>
  )
}
