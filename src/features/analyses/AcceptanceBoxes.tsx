import type { AgreementChoice } from './agreementChoice.ts'
import { NumberBox } from './NumberBox.tsx'

type AcceptanceBoxesProps = {
  choice: AgreementChoice
  onChange: (changes: Partial<AgreementChoice>) => void
  /** Of the scale, as a person reads it. */
  unit: string
  /** The protocol states limits, and for this scale. */
  planned: boolean
}

/** Limits between which the sensor would be acceptable, in the unit of the scale. */
export function AcceptanceBoxes({ choice, onChange, unit, planned }: AcceptanceBoxesProps) {
  const { lower, upper } = choice
  return (
    <fieldset className="space-y-3">
      <legend className="sr-only">Acceptance limits</legend>
      <div className="flex flex-wrap gap-x-6 gap-y-3">
        <NumberBox
          label="Acceptable from"
          value={lower}
          onChange={(value) => onChange({ lower: value })}
          refuse={(value) =>
            upper !== null && value >= upper ? 'Must lie below the upper limit.' : null
          }
        />
        <NumberBox
          label="up to"
          unit={unit}
          value={upper}
          onChange={(value) => onChange({ upper: value })}
          refuse={(value) =>
            lower !== null && value <= lower ? 'Must lie above the lower limit.' : null
          }
        />
      </div>
      <p className="text-sm text-ink-2">
        {planned
          ? 'Filled in from the protocol. With other limits the analysis differs from it.'
          : 'The protocol states none for this. Limits chosen after the data were seen prove nothing.'}
      </p>
    </fieldset>
  )
}
