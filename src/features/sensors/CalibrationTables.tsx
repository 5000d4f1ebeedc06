import { formatConcentration, formatCount, formatProbability } from '#shared/terms/numbers.ts'
import { StaticTable } from '../../ui/StaticTable.tsx'
import { Tag } from '../../ui/Tag.tsx'
import type { Calibration } from './calibrationOf.ts'
import { type CalibrationUnits, intervalWords, withUnit } from './calibrationWords.ts'

type CalibrationTablesProps = {
  calibration: Calibration
  units: CalibrationUnits
  limitPercent: number
}

/** The line with its intervals and its fit. */
export function LineTable({ calibration, units }: Omit<CalibrationTablesProps, 'limitPercent'>) {
  const { line } = calibration
  const perLevel = units.signal && units.level ? `${units.signal}/${units.level}` : undefined
  const fit = line.lackOfFit
  return (
    <>
      <StaticTable
        caption="The line"
        columns={[
          { header: 'The line' },
          { header: 'Estimate', numeric: true },
          { header: '95 % interval', numeric: true },
        ]}
        rows={[
          {
            key: 'slope',
            cells: [
              withUnit('Slope', perLevel),
              formatConcentration(line.slope, 5),
              intervalWords(line.slopeInterval),
            ],
          },
          {
            key: 'intercept',
            cells: [
              withUnit('Intercept', units.signal),
              formatConcentration(line.intercept, 5),
              intervalWords(line.interceptInterval),
            ],
          },
          {
            key: 'sd',
            cells: [
              line.weights === 'none'
                ? withUnit('Residual SD', units.signal)
                : 'Residual SD (signal × √weight)',
              formatConcentration(line.residualSd, 5),
              '',
            ],
          },
          { key: 'r2', cells: ['R²', formatConcentration(line.rSquared, 6), ''] },
        ]}
      />
      <p className="mt-2 text-sm text-ink-2">
        {formatCount(line.n)} readings.{' '}
        {fit
          ? `Lack of fit: F(${fit.df1}, ${fit.df2}) = ${formatConcentration(fit.f)}, p ${formatProbability(fit.p)}. ${fit.p < 0.05 ? 'The readings do not follow a straight line: narrow the range.' : 'No sign that the line is bent.'}`
          : line.lackOfFitNotDefined?.sentence}
      </p>
    </>
  )
}

/** What the line makes of its own standards. */
export function BackTable({ calibration, units, limitPercent }: CalibrationTablesProps) {
  return (
    <StaticTable
      caption="Back-calculated levels"
      columns={[
        { header: withUnit('Level', units.level), numeric: true },
        { header: 'Readings', numeric: true },
        { header: 'Back-calculated', numeric: true },
        { header: 'Residual', numeric: true },
        { header: `Within ${formatConcentration(limitPercent)} %`, numeric: true },
      ]}
      rows={calibration.back.map(({ level, readings, mean, relativeErrorPercent: percent }) => ({
        key: String(level),
        cells: [
          formatConcentration(level),
          formatCount(readings),
          formatConcentration(mean, 5),
          percent === null ? 'no percent of 0' : `${formatConcentration(percent, 3)} %`,
          percent === null ? '' : <Verdict key="v" within={Math.abs(percent) <= limitPercent} />,
        ],
      }))}
    />
  )
}

const Verdict = ({ within }: { within: boolean }) => (
  <Tag tone={within ? 'good' : 'warn'}>{within ? 'yes' : 'no'}</Tag>
)
