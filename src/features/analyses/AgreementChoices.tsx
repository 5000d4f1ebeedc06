import {
  AGREEMENT_SCALE_LABELS,
  AGREEMENT_SCALES,
  SPREAD_LABELS,
  SPREADS,
  TRUE_VALUE_LABELS,
  TRUE_VALUES,
} from '#shared/terms/agreementTerms.ts'
import type { AgreementChoice } from './agreementChoice.ts'
import { SelectChoice } from './SelectChoice.tsx'

const optionsOf = <T extends string>(values: readonly T[], labels: Record<T, string>) =>
  values.map((value) => ({ value, label: labels[value] }))
const SCALES = optionsOf(AGREEMENT_SCALES, AGREEMENT_SCALE_LABELS)
const TRUE_VALUE_OPTIONS = optionsOf(TRUE_VALUES, TRUE_VALUE_LABELS)
const SPREAD_OPTIONS = optionsOf(SPREADS, SPREAD_LABELS)

type AgreementChoicesProps = {
  choice: AgreementChoice
  onChange: (changes: Partial<AgreementChoice>) => void
  /** Every session of a subject goes in, and some have several. */
  clustered: boolean
}

/** On what scale the limits are, and what that scale leaves open. */
export function AgreementChoices({ choice, onChange, clustered }: AgreementChoicesProps) {
  return (
    <div className="mb-6 grid gap-x-5 gap-y-3 tablet:grid-cols-[repeat(auto-fill,minmax(250px,1fr))]">
      <SelectChoice
        label="Limits as"
        value={choice.scale}
        options={SCALES}
        onChange={(scale) => onChange({ scale })}
      />
      {clustered && (
        <SelectChoice
          label="A subject’s true value"
          value={choice.trueValue}
          options={TRUE_VALUE_OPTIONS}
          onChange={(trueValue) => onChange({ trueValue })}
        />
      )}
      {choice.scale === 'regression' && !clustered && (
        <SelectChoice
          label="The spread"
          value={choice.spread}
          options={SPREAD_OPTIONS}
          onChange={(spread) => onChange({ spread })}
        />
      )}
    </div>
  )
}
