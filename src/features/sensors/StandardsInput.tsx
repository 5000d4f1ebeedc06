import type { CalibrationWeights } from '#shared/statistics/sensor/calibrationLine.ts'
import { Segments } from '../../ui/Segments.tsx'
import { ChoiceField } from './ChoiceField.tsx'
import { CsvInput } from './CsvInput.tsx'
import type { Standards, StandardsGiven } from './calibrationOf.ts'
import { RefusedLines } from './RefusedLines.tsx'
import { INVENTED_STANDARDS } from './sampleTexts.ts'

type StandardsInputProps = {
  given: StandardsGiven
  onGiven: (given: StandardsGiven) => void
  standards: Standards | null
  problem: string | null
}

const WEIGHTS: { value: CalibrationWeights; label: string }[] = [
  { value: 'none', label: 'none' },
  { value: '1/x', label: '1/level' },
  { value: '1/x²', label: '1/level²' },
]

/** Readings of gas standards: the file, its columns, and the weights of the line. */
export function StandardsInput({ given, onGiven, standards, problem }: StandardsInputProps) {
  return (
    <div className="space-y-4 print:hidden">
      <CsvInput
        label="Readings of gas standards"
        hint="One line for each reading, with the certified level and the signal."
        text={given.text}
        onText={(text) => onGiven({ ...given, text })}
        problem={given.text === '' ? null : problem}
        invented={INVENTED_STANDARDS}
      />
      {standards && (
        <>
          <div className="grid grid-cols-[repeat(auto-fit,minmax(min(100%,11rem),1fr))] gap-4">
            <ChoiceField
              label="Column of the level"
              value={standards.levelColumn}
              options={standards.table.headings}
              onChange={(levelColumn) => onGiven({ ...given, levelColumn })}
            />
            <ChoiceField
              label="Column of the signal"
              value={standards.signalColumn}
              options={standards.table.headings}
              onChange={(signalColumn) => onGiven({ ...given, signalColumn })}
            />
          </div>
          <div>
            <Segments
              label="Weights"
              options={WEIGHTS}
              value={given.weights}
              onChange={(weights) => onGiven({ ...given, weights })}
            />
            <p className="mt-1 text-sm text-ink-2">Where the error grows with the level.</p>
          </div>
          <RefusedLines
            refused={standards.refused}
            consequence="These lines are left out of the line."
          />
        </>
      )}
    </div>
  )
}
