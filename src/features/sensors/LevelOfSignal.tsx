import { EntryGrid } from '../../forms/EntryGrid.tsx'
import type { EntryProblems } from '../../forms/entries.ts'
import type { Calibration } from './calibrationOf.ts'
import { levelOfSignal } from './calibrationOf.ts'
import { amount, type CalibrationUnits, intervalWords } from './calibrationWords.ts'
import type { SIGNAL_ENTRIES } from './signalEntries.ts'

type LevelOfSignalProps = {
  entries: typeof SIGNAL_ENTRIES
  texts: Readonly<Record<string, string>>
  problems: EntryProblems | null
  onText: (name: string, text: string) => void
  values: { signal: number | undefined; signalReadings: number } | null
  calibration: Calibration
  units: CalibrationUnits
}

/** The level that a typed signal points to, with its limits. */
export function LevelOfSignal(props: LevelOfSignalProps) {
  const { entries, texts, problems, onText, values, calibration, units } = props
  return (
    <section className="mt-7">
      <h2>The level of a signal</h2>
      <EntryGrid
        entries={entries}
        names={['signal', 'signalReadings']}
        texts={texts}
        problems={problems}
        onText={onText}
      />
      {values?.signal !== undefined && (
        <Found
          calibration={calibration}
          units={units}
          signal={values.signal}
          readings={values.signalReadings}
        />
      )}
    </section>
  )
}

function Found(props: {
  calibration: Calibration
  units: CalibrationUnits
  signal: number
  readings: number
}) {
  const { calibration, units, signal, readings } = props
  const { found, note } = levelOfSignal(calibration, signal, readings)
  return (
    <p className="mt-3" aria-live="polite">
      <strong className="text-lg">{amount(found.level, units.level, 5)}</strong>{' '}
      {note === null && found.fieller ? (
        <span className="text-ink-2">
          (95 % Fieller limits {intervalWords(found.fieller)}; standard error{' '}
          {amount(found.standardError, units.level)})
        </span>
      ) : (
        <span className="text-ink-2">{note}</span>
      )}
    </p>
  )
}
