import { useId } from 'react'
import { curvePoints } from '#shared/analyses/curvePoints.ts'
import { RocCurve } from '#shared/figures/RocCurve.tsx'
import type { PanelParameters, PanelResult } from '#shared/schemas/panel.ts'
import { formatCount, formatEstimate, formatProbability } from '#shared/terms/numbers.ts'
import { panelAreaNote, panelTermTexts } from '#shared/terms/panelText.ts'
import { intervalHeading } from '#shared/terms/resultText.ts'
import { Facts } from '../../ui/Facts.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'

type StoredPanelProps = { result: PanelResult; parameters: PanelParameters }

/** Corrected area, coefficients, calibration and net benefit of a panel. */
export function StoredPanel({ result, parameters }: StoredPanelProps) {
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 560, first: 470 })
  const { area, areaWithheld, brier, calibration, likelihoodRatio, caveats } = result
  return (
    <>
      <div className="grid gap-x-[30px] gap-y-6 wide:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <section aria-labelledby={`${id}-area`} ref={ref} className="min-w-0">
          <h2 id={`${id}-area`}>
            {area ? `Corrected area under the curve ${formatEstimate(area.estimate)}` : 'ROC curve'}
          </h2>
          <p className="mb-3 text-sm">{area ? panelAreaNote(area) : areaWithheld}</p>
          <div style={{ maxWidth: width }}>
            <RocCurve
              id={`${id}-roc`}
              curves={[{ label: 'Panel, as fitted', unit: '', points: curvePoints(result.curve) }]}
              width={width}
              theme={theme}
            />
          </div>
          <p className="mt-2 text-sm text-ink-2">
            The curve is that of the data the panel was fitted to, which flatters it.
          </p>
        </section>
        <section aria-labelledby={`${id}-fit`} className="min-w-0">
          <h2 id={`${id}-fit`}>How the probabilities fit</h2>
          <Facts
            layout="rows"
            items={[
              { term: 'Brier score', value: formatEstimate(brier.brier) },
              { term: 'Scaled Brier score', value: formatEstimate(brier.scaled) },
              { term: 'Mean probability', value: formatEstimate(calibration.meanFitted) },
              { term: 'Share with the condition', value: formatEstimate(calibration.prevalence) },
              { term: 'Calibration slope', value: formatEstimate(calibration.slope) },
              { term: 'Calibration intercept', value: formatEstimate(calibration.intercept) },
              {
                term: 'Likelihood ratio',
                value: `χ² ${formatEstimate(likelihoodRatio.chiSquared, 2)} on ${likelihoodRatio.df} df, p ${formatProbability(likelihoodRatio.p)}`,
              },
            ]}
          />
          <div className="mt-3 space-y-2 text-sm text-ink-2">
            <p>{calibration.note}</p>
            {caveats.map((caveat) => (
              <p key={caveat} className="text-ink">
                {caveat}
              </p>
            ))}
          </div>
        </section>
      </div>
      <Coefficients result={result} parameters={parameters} />
      <Benefit result={result} />
    </>
  )
}

function Coefficients({ result, parameters }: StoredPanelProps) {
  const heading = intervalHeading(parameters.confidence)
  return (
    <section aria-label="Coefficients" className="mt-6 border-t border-rule pt-5">
      <h2>Coefficients</h2>
      <StaticTable
        caption="Coefficients"
        columns={[
          { header: 'Term' },
          { header: 'Coefficient', numeric: true },
          { header: heading, numeric: true },
          { header: 'Odds ratio', numeric: true },
          { header: `Odds ratio, ${heading}`, numeric: true },
          { header: 'p', numeric: true },
        ]}
        rows={result.terms.map((term) => {
          const { estimate, interval, oddsRatio, oddsInterval, p } = panelTermTexts(term)
          return {
            key: term.term,
            cells: [term.term, estimate, interval, oddsRatio, oddsInterval, p],
          }
        })}
      />
      <p className="mt-3 text-sm text-ink-2">
        Logistic regression by maximum likelihood, Wald intervals.{' '}
        {parameters.scale === 'log'
          ? 'Odds ratios are for a factor of e (2.718) of the value.'
          : 'Odds ratios are for one unit of the value.'}
      </p>
    </section>
  )
}

function Benefit({ result: { netBenefit, netBenefitHidden } }: { result: PanelResult }) {
  return (
    <section aria-label="Net benefit" className="mt-6 border-t border-rule pt-5">
      <h2>Net benefit</h2>
      {netBenefitHidden && <p className="text-sm">{netBenefitHidden}</p>}
      {netBenefit && (
        <>
          <StaticTable
            caption="Net benefit of acting at a probability"
            columns={[
              { header: 'Acting at', numeric: true },
              { header: 'True positives', numeric: true },
              { header: 'False positives', numeric: true },
              { header: 'Net benefit', numeric: true },
              { header: 'Acting on all', numeric: true },
            ]}
            rows={netBenefit.map((row) => ({
              key: String(row.threshold),
              cells: [
                formatEstimate(row.threshold, 2),
                formatCount(row.truePositives),
                formatCount(row.falsePositives),
                formatEstimate(row.netBenefit),
                formatEstimate(row.treatAll),
              ],
            }))}
          />
          <p className="mt-3 text-sm text-ink-2">
            Acting on nobody has a net benefit of 0 (Vickers & Elkin 2006).
          </p>
        </>
      )}
    </section>
  )
}
