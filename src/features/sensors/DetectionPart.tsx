import { Link } from 'react-router-dom'
import type { LimitOfBlank } from '#shared/statistics/sensor/limitOfBlank.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { BlanksInput } from './BlanksInput.tsx'
import { type Calibration, limitsOf } from './calibrationOf.ts'
import { type CalibrationUnits, unitsOf, withUnit } from './calibrationWords.ts'
import { unitOf } from './columnHints.ts'
import type { BlanksWork } from './useBlanks.ts'
import type { StandardsWork } from './useStandards.ts'

type DetectionPartProps = { standards: StandardsWork; blanks: BlanksWork }

/** Limits of detection and quantitation from the line, and of blank and detection from blanks. */
export function DetectionPart({ standards, blanks }: DetectionPartProps) {
  const { calibration } = standards
  const units: CalibrationUnits = standards.standards
    ? unitsOf(standards.standards)
    : { level: undefined, signal: unitOf(blanks.blanks?.signalColumn ?? '') }
  return (
    <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.8fr)_minmax(0,1fr)]">
      <div className="min-w-0">
        <BlanksInput work={blanks} />
      </div>
      <div className="min-w-0">
        <section>
          <h2>From the calibration line</h2>
          {calibration ? (
            <LimitsByLine
              calibration={calibration}
              units={units}
              blankSd={blanks.limits?.blank.sd ?? null}
            />
          ) : (
            <EmptyPlace title="No line yet">
              Limits in the unit of the standards need one. Give them under{' '}
              <Link to="/sensor/calibration">Calibration</Link>.
            </EmptyPlace>
          )}
        </section>
        <section className="mt-7">
          <h2>From blanks and low samples</h2>
          {blanks.limits ? (
            <LimitsByBlanks limits={blanks.limits} units={units} calibration={calibration} />
          ) : blanks.refusal ? (
            <Notice tone="warn" title="No limits yet">
              {blanks.refusal}
            </Notice>
          ) : (
            <EmptyPlace title="No blanks yet">
              Drop a file of blank and low readings, or paste its lines. They are read in this
              browser and go nowhere.
            </EmptyPlace>
          )}
        </section>
      </div>
    </div>
  )
}

function LimitsByLine(props: {
  calibration: Calibration
  units: CalibrationUnits
  blankSd: number | null
}) {
  const { calibration, units, blankSd } = props
  const limits = limitsOf(calibration, blankSd)
  const { weights } = calibration.line
  const row = (name: string, limit: typeof limits.fromBlanks, otherwise: string) => ({
    key: name,
    cells: [
      name,
      ...(limit
        ? [limit.sigma, limit.detection, limit.quantitation].map((value) =>
            formatConcentration(value),
          )
        : [otherwise, '', '']),
    ],
  })
  return (
    <>
      <StaticTable
        caption="Limits of detection and quantitation"
        columns={[
          { header: 'σ from' },
          { header: withUnit('σ', units.signal), numeric: true },
          { header: withUnit('LoD', units.level), numeric: true },
          { header: withUnit('LoQ', units.level), numeric: true },
        ]}
        rows={[
          row('SD of blanks', limits.fromBlanks, 'no blanks yet'),
          row('Standard error of the intercept', limits.fromInterceptError, ''),
          row('Residual SD of the line', limits.fromResidualSd, 'not for a weighted line'),
        ]}
      />
      <p className="mt-2 text-sm text-ink-2">
        LoD = 3.3 σ/slope, LoQ = 10 σ/slope,{' '}
        {weights === 'none' ? 'unweighted line' : `weights ${weights}`}. The three differ: name the
        one that you report. Where the error grows with the level, the residual SD is far too high
        near 0.
      </p>
    </>
  )
}

function LimitsByBlanks(props: {
  limits: LimitOfBlank
  units: CalibrationUnits
  calibration: Calibration | null
}) {
  const { limits, units, calibration } = props
  const line = calibration?.line
  const rows: [string, number][] = [
    ['Limit of blank', limits.limitOfBlank],
    ['Limit of detection', limits.limitOfDetection],
    ['Limit of detection, small-sample factor', limits.limitOfDetectionSmallSample],
    ['Limit of detection, factor for both', limits.limitOfDetectionBothSmallSample],
  ]
  const { blank, low } = limits
  return (
    <>
      <StaticTable
        caption="Limits of blank and of detection"
        columns={[
          { header: 'Limit' },
          { header: withUnit('Signal', units.signal), numeric: true },
          { header: withUnit('Level', units.level), numeric: true },
        ]}
        rows={rows.map(([name, signal]) => ({
          key: name,
          cells: [
            name,
            formatConcentration(signal),
            line ? formatConcentration((signal - line.intercept) / line.slope) : 'needs a line',
          ],
        }))}
      />
      <p className="mt-2 text-sm text-ink-2">
        {formatCount(blank.n)} blanks: mean {formatConcentration(blank.mean)}, SD{' '}
        {formatConcentration(blank.sd)}, 95th percentile {formatConcentration(blank.percentile95)}.{' '}
        {formatCount(low.n)} low: mean {formatConcentration(low.mean)}, SD{' '}
        {formatConcentration(low.sd)}. LoB = mean + 1.645 SD of blanks; LoD = LoB + 1.645 SD of low
        samples; the factor for small samples is 1.645/(1 − 1/(4(n − 1))).
      </p>
    </>
  )
}
