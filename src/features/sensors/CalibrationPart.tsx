import { type ReactNode, useCallback, useId, useState } from 'react'
import { CalibrationLine } from '#shared/figures/CalibrationLine.tsx'
import { calibrationTable } from '#shared/figures/calibrationTable.ts'
import { ResidualPlot } from '#shared/figures/ResidualPlot.tsx'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { EntryField } from '../../forms/EntryField.tsx'
import { readEntries } from '../../forms/entries.ts'
import { EmptyPlace } from '../../ui/EmptyPlace.tsx'
import { FigureNumbers } from '../../ui/FigureNumbers.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { useFigureTheme } from '../../ui/useFigureTheme.ts'
import { useMeasuredWidth } from '../../ui/useMeasuredWidth.ts'
import { BackTable, LineTable } from './CalibrationTables.tsx'
import { type Calibration, levelOfSignal } from './calibrationOf.ts'
import { type CalibrationUnits, unitsOf } from './calibrationWords.ts'
import { LevelOfSignal } from './LevelOfSignal.tsx'
import { StandardsInput } from './StandardsInput.tsx'
import { SIGNAL_ENTRIES } from './signalEntries.ts'
import type { StandardsWork } from './useStandards.ts'

type CalibrationPartProps = { work: StandardsWork; provenance: readonly string[] }

/** A calibration line from readings of gas standards, its residuals, and the level of a signal. */
export function CalibrationPart({ work, provenance }: CalibrationPartProps) {
  const { standards, calibration, refusal } = work
  const [texts, setTexts] = useState<Record<string, string>>({})
  const { values, problems } = readEntries(SIGNAL_ENTRIES, texts)
  const onText = (name: string, text: string) => setTexts({ ...texts, [name]: text })
  return (
    <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.8fr)_minmax(0,1fr)]">
      <div className="min-w-0">
        <StandardsInput
          given={work.given}
          onGiven={work.onGiven}
          standards={standards}
          problem={work.problem}
        />
        {calibration && standards && (
          <LevelOfSignal
            entries={SIGNAL_ENTRIES}
            texts={texts}
            problems={problems}
            onText={onText}
            values={values}
            calibration={calibration}
            units={unitsOf(standards)}
          />
        )}
      </div>
      <div className="min-w-0">
        {calibration && standards ? (
          <Drawn
            calibration={calibration}
            units={unitsOf(standards)}
            limitPercent={values?.limitPercent ?? 5}
            limitField={
              <EntryField
                entry={SIGNAL_ENTRIES.limitPercent}
                text={texts.limitPercent ?? SIGNAL_ENTRIES.limitPercent.start}
                problem={problems?.limitPercent}
                onText={(text) => onText('limitPercent', text)}
              />
            }
            signal={
              values?.signal === undefined
                ? null
                : { mean: values.signal, readings: values.signalReadings }
            }
            provenance={provenance}
          />
        ) : refusal ? (
          <Notice tone="warn" title="No line yet">
            {refusal}
          </Notice>
        ) : (
          <EmptyPlace title="No standards yet">
            Drop a file of readings, or paste its lines. They are read in this browser and go
            nowhere.
          </EmptyPlace>
        )}
      </div>
    </div>
  )
}

type DrawnProps = {
  calibration: Calibration
  units: CalibrationUnits
  limitPercent: number
  limitField: ReactNode
  signal: { mean: number; readings: number } | null
  provenance: readonly string[]
}

function Drawn(props: DrawnProps) {
  const { calibration, units, limitPercent, limitField, signal, provenance } = props
  const id = useId()
  const theme = useFigureTheme()
  const { ref, width } = useMeasuredWidth<HTMLDivElement>({ least: 280, most: 620, first: 520 })
  const { line, readings } = calibration
  const level = { label: 'Level', unit: units.level }
  const axis = { label: 'Signal', unit: units.signal }
  const residuals = readings.flatMap(({ level: at, percent }) =>
    percent === null ? [] : [{ level: at, percent }],
  )
  const table = useCallback(
    () =>
      calibrationTable({
        readings,
        level: { label: 'Level', unit: units.level },
        signal: { label: 'Signal', unit: units.signal },
      }),
    [readings, units.level, units.signal],
  )
  return (
    <div ref={ref}>
      <h2>{equationOf(line)}</h2>
      <figure style={{ maxWidth: width }} className="mb-2">
        <CalibrationLine
          id={`${id}-line`}
          readings={readings}
          line={line}
          level={level}
          signal={axis}
          {...(signal ? { found: foundOf(calibration, signal) } : {})}
          width={width}
          theme={theme}
        />
      </figure>
      <LineTable calibration={calibration} units={units} />
      <h2 className="mt-7">What the line makes of its standards</h2>
      <figure style={{ maxWidth: width }} className="mb-2">
        <ResidualPlot
          id={`${id}-residuals`}
          residuals={residuals}
          level={level}
          limitPercent={limitPercent}
          width={width}
          theme={theme}
        />
      </figure>
      <BackTable calibration={calibration} units={units} limitPercent={limitPercent} />
      <div className="mt-3 mb-4 print:hidden">{limitField}</div>
      <FigureNumbers
        summary="The readings in numbers"
        table={table}
        provenance={provenance}
        fileName="calibration"
      />
    </div>
  )
}

function equationOf({ intercept, slope }: { intercept: number; slope: number }): string {
  const sign = slope < 0 ? '−' : '+'
  return `Signal = ${formatConcentration(intercept)} ${sign} ${formatConcentration(Math.abs(slope))} × level`
}

function foundOf(calibration: Calibration, { mean, readings }: { mean: number; readings: number }) {
  const { found, note } = levelOfSignal(calibration, mean, readings)
  return { signal: mean, level: found.level, interval: note === null ? found.fieller : null }
}
